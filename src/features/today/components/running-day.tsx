import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { isHidden, type Contact, type PlanSummary } from '../../../../shared/schemas/plan.ts';
import { DayLoad } from '../../../components/day-load.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { PlanStateChip } from '../../../components/state-chips.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useNow } from '../../../hooks/use-now.ts';
import { counted, degrees } from '../../../lib/format-number.ts';
import { clockSeconds, countdown } from '../../../lib/format-time.ts';
import { planQueries } from '../../../queries/plan-queries.ts';
import { stationQueries } from '../../../queries/station-queries.ts';

const NEXT = 7;

/** The plan of record of today: its load, what is up, what comes next. */
export function RunningDay({ summary }: { summary: PlanSummary }) {
  const plan = useQuery(planQueries.one(summary.id));
  const now = useNow();
  return (
    <Panel
      title="The day"
      flush
      aside={`revision ${summary.revision}, ${counted(summary.score.contacts, 'contact')} of ${counted(summary.score.passes, 'pass', 'passes')}`}
      actions={
        <>
          <PlanStateChip state={summary.state} />
          <Link className="link" to={`/plans/${summary.id}`}>
            Open the plan
          </Link>
        </>
      }
    >
      <QueryView query={plan} what="The plan of today">
        {(data) => (
          <>
            <DayLoad plan={data} nowMs={now} />
            <NextContacts
              contacts={data.contacts.filter((one): one is Contact => !isHidden(one))}
              stationId={data.stationId}
              now={now}
            />
          </>
        )}
      </QueryView>
    </Panel>
  );
}

interface NextProps {
  contacts: readonly Contact[];
  stationId: string;
  now: number;
}

function NextContacts({ contacts, stationId, now }: NextProps) {
  const missions = useMissions();
  const channels = useQuery(stationQueries.channels(stationId)).data;
  const labelOf = (id: string): string => channels?.find((one) => one.id === id)?.label ?? '–';
  const coming = contacts
    .map((contact) => ({
      contact,
      fromMs: Date.parse(contact.receive.fromUtc),
      toMs: Date.parse(contact.receive.toUtc),
    }))
    .filter(({ toMs }) => toMs > now)
    .sort((a, b) => a.fromMs - b.fromMs)
    .slice(0, NEXT);
  if (coming.length === 0)
    return <p className="px-4 pt-2 pb-3 text-ink-muted">No contact is left today.</p>;
  return (
    <Table caption="Running and coming contacts">
      <thead>
        <tr>
          <Head>Now and next</Head>
          <Head num>Begins in, ends in</Head>
          <Head>From UTC</Head>
          <Head>To</Head>
          <Head>Beam</Head>
          <Head num unit="deg">
            Highest
          </Head>
        </tr>
      </thead>
      <tbody>
        {coming.map(({ contact, fromMs, toMs }) => {
          const running = fromMs <= now;
          return (
            <tr key={contact.id} className={running ? 'bg-accent-soft' : ''}>
              <RowHead>
                <span className="flex items-center gap-2">
                  <MissionMark series={missions.series(contact.missionId)} />
                  {contact.satelliteName}
                </span>
              </RowHead>
              <Cell num strong={running}>
                {running ? `up, ${countdown(toMs - now)} left` : countdown(fromMs - now)}
              </Cell>
              <Cell>{clockSeconds(fromMs)}</Cell>
              <Cell>{clockSeconds(toMs)}</Cell>
              <Cell>
                {labelOf(contact.receive.channelId)}
                {contact.transmit && (
                  <span className="text-ink-muted"> ↑ {labelOf(contact.transmit.channelId)}</span>
                )}
              </Cell>
              <Cell num>{degrees(contact.maxElevationDeg).slice(0, -1)}</Cell>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
