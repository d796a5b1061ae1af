import { Link, useNavigate } from 'react-router-dom';
import type { PlanSummary } from '../../../../../shared/schemas/plan.ts';
import type { Station } from '../../../../../shared/schemas/station.ts';
import { Button } from '../../../../components/button.tsx';
import { ToneWord } from '../../../../components/chip.tsx';
import { PlanStateChip } from '../../../../components/state-chips.tsx';
import { ErrorNote } from '../../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../../components/table.tsx';
import { counted, decimals, MISSING } from '../../../../lib/format-number.ts';
import { dayNumber, longDay, monthDayClock } from '../../../../lib/format-time.ts';
import { useCreatePlan } from '../../../../queries/plan-queries.ts';

interface Props {
  days: readonly string[];
  today: string;
  plans: readonly PlanSummary[];
  station: Station;
  mayBegin: boolean;
}

/** A row a day: the revision in force and, where there is one, the revision in hand. */
export function DayTable({ days, today, plans, station, mayBegin }: Props) {
  const create = useCreatePlan();
  const navigate = useNavigate();
  const begin = (day: string): void =>
    create.mutate(
      { stationId: station.id, day },
      { onSuccess: (plan) => void navigate(`/plans/${plan.id}`) },
    );
  return (
    <>
      <div className="px-4">
        <ErrorNote error={create.error} />
      </div>
      <Table caption="Day plans">
        <thead>
          <tr>
            <Head>Day</Head>
            <Head num>Day of year</Head>
            <Head>State</Head>
            <Head num>Revision</Head>
            <Head num>Contacts</Head>
            <Head num unit="min">
              Contact time
            </Head>
            <Head num>Short</Head>
            <Head>Sign-off</Head>
            <Head unit="UTC">Changed</Head>
          </tr>
        </thead>
        <tbody>
          {days.map((day) => (
            <DayRows
              key={day}
              day={day}
              isToday={day === today}
              plans={plans.filter((plan) => plan.day === day && plan.state !== 'superseded')}
              begin={
                mayBegin && day >= today
                  ? {
                      act: () => begin(day),
                      busy: create.isPending && create.variables.day === day,
                    }
                  : null
              }
            />
          ))}
        </tbody>
      </Table>
    </>
  );
}

interface RowProps {
  day: string;
  isToday: boolean;
  plans: readonly PlanSummary[];
  begin: { act: () => void; busy: boolean } | null;
}

function DayRows({ day, isToday, plans, begin }: RowProps) {
  const name = (
    <span className="flex items-baseline gap-2">
      {longDay(day)}
      {isToday && <span className="text-caption font-medium text-accent">today</span>}
    </span>
  );
  if (plans.length === 0)
    return (
      <tr>
        <RowHead className="font-normal">{name}</RowHead>
        <Cell num>{dayNumber(day)}</Cell>
        <Cell colSpan={7}>
          {begin ? (
            <Button size="small" icon="add" busy={begin.busy} onClick={begin.act}>
              Begin the plan <span className="sr-only">of {longDay(day)}</span>
            </Button>
          ) : (
            <span className="text-ink-muted">no plan</span>
          )}
        </Cell>
      </tr>
    );
  return plans
    .toSorted((a, b) => b.revision - a.revision)
    .map((plan, index) => (
      <tr key={plan.id} className="hover:bg-raised">
        <RowHead>
          <Link to={`/plans/${plan.id}`} className="rounded-mark hover:underline">
            {index === 0 ? (
              name
            ) : (
              <span className="sr-only">{longDay(day)}, revision in force</span>
            )}
            {index > 0 && <span aria-hidden="true">in force</span>}
          </Link>
        </RowHead>
        <Cell num>{index === 0 && dayNumber(day)}</Cell>
        <Cell>
          <span className="flex flex-wrap items-center gap-2">
            <PlanStateChip state={plan.state} returned={plan.returned !== null} />
            {plan.needsAttention && (
              <ToneWord tone="warn" icon="warning">
                needs attention
              </ToneWord>
            )}
          </span>
        </Cell>
        <Cell num>{plan.revision}</Cell>
        <Cell num>
          {plan.score.contacts} of {plan.score.passes}
        </Cell>
        <Cell num>{decimals(plan.score.minutes, 0)}</Cell>
        <Cell num>{plan.score.requirementsShort}</Cell>
        <Cell>{signWords(plan)}</Cell>
        <Cell className="figures">{monthDayClock(Date.parse(plan.updatedUtc))}</Cell>
      </tr>
    ));
}

function signWords(plan: PlanSummary): string {
  if (plan.signOffs.length === 0) return MISSING;
  const signed = plan.signOffs.filter(
    (one) => one.state === 'approved' || one.state === 'unchanged',
  ).length;
  return `${signed} of ${counted(plan.signOffs.length, 'mission')} signed`;
}
