import { PlanStateChip } from '../../../components/state-chips.tsx';
import { Segmented } from '../../../components/segmented.tsx';
import { counted } from '../../../lib/format-number.ts';
import { dayNumber, longDay } from '../../../lib/format-time.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanView, type PlanViewName } from '../hooks/plan-view.ts';
import { PlanActions } from './plan-actions.tsx';
import { SignOffMarks } from './sign-off-marks.tsx';

const VIEWS: { value: PlanViewName; label: string }[] = [
  { value: 'calendar', label: 'Calendar' },
  { value: 'sky', label: 'Sky' },
  { value: 'map', label: 'Map' },
  { value: 'table', label: 'Table' },
];

/** Day, state, views, signatures and the one primary action. */
export function PlanBar() {
  const { plan, missions } = usePlanDesk();
  const { view, setView } = usePlanView();
  const { score } = plan;
  return (
    <div className="flex flex-wrap items-center gap-x-7 gap-y-2 border-b border-line bg-surface px-5 py-2">
      <div>
        <div className="flex items-center gap-2">
          <h1 className="text-page font-semibold">{longDay(plan.day)}</h1>
          <PlanStateChip state={plan.state} returned={plan.returned !== null} />
        </div>
        <p className="figures flex flex-wrap gap-x-3 text-caption text-ink-muted">
          <span>day {dayNumber(plan.day)}</span>
          <span>revision {plan.revision}</span>
          <span>
            {counted(score.contacts, 'contact')} of {counted(score.passes, 'pass', 'passes')}
          </span>
          <span>limit {plan.limitOfDayDb.toFixed(1)} dB</span>
          <span>
            {score.requirementsMet} requirements met
            {score.requirementsShort > 0 && `, ${score.requirementsShort} short`}
          </span>
        </p>
      </div>
      <Segmented label="View of the plan" options={VIEWS} value={view} onChange={setView} />
      <div className="ml-auto flex flex-wrap items-center gap-x-5 gap-y-2">
        <SignOffMarks signOffs={plan.signOffs} plan={plan} series={missions.series} />
        <PlanActions />
      </div>
    </div>
  );
}
