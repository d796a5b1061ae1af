import { useQueryClient } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Button, IconButton } from '../../../components/button.tsx';
import { Icon, type IconName } from '../../../components/icon.tsx';
import { RunProgress } from '../../../components/run-progress.tsx';
import { dateClock } from '../../../lib/format-time.ts';
import { refreshPlans } from '../../../queries/plan-queries.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanEdits } from '../hooks/plan-edits.ts';
import { AssignmentOutcome } from './assignment-outcome.tsx';

/** What somebody must know of this plan before anything else. */
export function PlanNotices() {
  const { plan, missions } = usePlanDesk();
  const { returned, needsAttention } = plan;
  return (
    <>
      {returned && plan.state === 'draft' && (
        <Notice icon="returned">
          <strong className="font-semibold">
            {missions.name(returned.missionId)} returned the plan
          </strong>{' '}
          on {dateClock(Date.parse(returned.atUtc))} UTC, {returned.byName}: “{returned.comment}”
        </Notice>
      )}
      {needsAttention && plan.state !== 'superseded' && (
        <Notice icon="needsAttention">
          <strong className="font-semibold">Needs attention.</strong> {needsAttention}
        </Notice>
      )}
      <RunNotice />
    </>
  );
}

function Notice({ icon, children }: { icon: IconName; children: ReactNode }) {
  return (
    <div className="flex items-start gap-2.5 border-b border-line bg-warn-soft px-5 py-1.5 text-warn-text">
      <Icon name={icon} className="mt-px" />
      <p className="min-w-0">{children}</p>
    </div>
  );
}

/** The assignment as it runs; it goes on when its dialog is closed. */
function RunNotice() {
  const { runId, setRunId, open, dialog } = usePlanEdits();
  const client = useQueryClient();
  if (!runId || dialog?.kind === 'assignment') return null;
  return (
    <div className="flex items-center gap-4 border-b border-line bg-surface px-5 py-2">
      <div className="max-w-160 min-w-0 flex-1">
        <RunProgress runId={runId} onOver={() => void refreshPlans(client)} />
        <AssignmentOutcome runId={runId} />
      </div>
      <Button size="small" onClick={() => open({ kind: 'assignment' })}>
        Details
      </Button>
      <IconButton icon="close" label="Close this line" onClick={() => setRunId(null)} />
    </div>
  );
}
