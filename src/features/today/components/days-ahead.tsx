import { Link } from 'react-router-dom';
import type { PlanSummary } from '../../../../shared/schemas/plan.ts';
import { Panel } from '../../../components/panel.tsx';
import { PlanStateChip } from '../../../components/state-chips.tsx';
import { mediumDay, nextDay } from '../../../lib/format-time.ts';
import { planOfRecord } from '../plan-of-record.ts';

interface Props {
  today: string;
  plans: readonly PlanSummary[];
}

/** Today runs, tomorrow is in sign-off, the days after are outlook. */
export function DaysAhead({ today, plans }: Props) {
  return (
    <Panel title="Days ahead">
      <ul className="figures">
        {[0, 1, 2, 3].map((ahead) => {
          const day = nextDay(today, ahead);
          const plan = planOfRecord(plans, day);
          return (
            <li key={day} className="border-t border-line-soft py-2 first:border-t-0 first:pt-0">
              <div className="flex items-center gap-2.5">
                {plan ? (
                  <Link className="link w-21" to={`/plans/${plan.id}`}>
                    {mediumDay(day)}
                  </Link>
                ) : (
                  <span className="w-21 font-medium">{mediumDay(day)}</span>
                )}
                {plan ? (
                  <PlanStateChip state={plan.state} returned={plan.returned !== null} />
                ) : (
                  <span className="text-ink-muted">no plan yet</span>
                )}
                {plan && (
                  <span className="ml-auto text-ink-muted">
                    {plan.score.contacts} of {plan.score.passes}
                  </span>
                )}
              </div>
              {plan && plan.signOffs.length > 0 && plan.state === 'in-review' && (
                <p className="mt-1 text-caption text-ink-muted">
                  {plan.signOffs.filter(({ state }) => state !== 'pending').length} of{' '}
                  {plan.signOffs.length} missions signed
                </p>
              )}
            </li>
          );
        })}
      </ul>
    </Panel>
  );
}
