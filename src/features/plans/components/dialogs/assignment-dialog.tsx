import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { SelectField } from '../../../../components/field.tsx';
import { RunProgress } from '../../../../components/run-progress.tsx';
import { ErrorNote } from '../../../../components/states.tsx';
import { counted } from '../../../../lib/format-number.ts';
import { refreshPlans, useStartAssignment } from '../../../../queries/plan-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { AssignmentOutcome } from '../assignment-outcome.tsx';

/** Lets the server assign passes to beam channels, with its progress and a proof of how good the plan is. */
export function AssignmentDialog({ onClose }: { onClose: () => void }) {
  const { plan, openPasses } = usePlanDesk();
  const { runId, setRunId } = usePlanEdits();
  const client = useQueryClient();
  const start = useStartAssignment();
  const [mode, setMode] = useState<'new' | 'repair'>(plan.revision > 1 ? 'repair' : 'new');
  const [seconds, setSeconds] = useState(20);
  const [over, setOver] = useState(false);
  const locked = plan.contacts.filter((one) => !('hidden' in one) && one.locked).length;
  const begin = (): void => {
    setOver(false);
    start.mutate(
      { plan, body: { mode, timeLimitSeconds: seconds } },
      { onSuccess: (started) => setRunId(started.runId) },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title="Assign the open passes"
      description={`${counted(openPasses?.length ?? 0, 'pass', 'passes')} open, limit of the day ${plan.limitOfDayDb.toFixed(1)} dB`}
      footer={
        <>
          <Button onClick={onClose}>{runId && !over ? 'Close, let it run' : 'Close'}</Button>
          <Button
            variant="primary"
            busy={start.isPending || (runId !== null && !over)}
            onClick={begin}
          >
            {over ? 'Assign again' : 'Assign'}
          </Button>
        </>
      }
    >
      <fieldset className="flex flex-col gap-2">
        <legend className="mb-1 text-body font-semibold">How</legend>
        <Choice
          name="mode"
          checked={mode === 'new'}
          onChoose={() => setMode('new')}
          title="Plan anew"
        >
          The best plan by the missions’ requirements;{' '}
          {locked > 0
            ? `${counted(locked, 'locked contact stays', 'locked contacts stay')}.`
            : 'locked contacts stay.'}
        </Choice>
        <Choice
          name="mode"
          checked={mode === 'repair'}
          onChoose={() => setMode('repair')}
          title="Repair"
        >
          Mend what is broken and fill what is open, with the fewest changed contacts.
        </Choice>
      </fieldset>
      <SelectField
        label="At most"
        className="mt-3 w-40"
        value={seconds}
        onChange={(event) => setSeconds(Number(event.target.value))}
      >
        {[5, 10, 20, 60, 120].map((count) => (
          <option key={count} value={count}>
            {count} s
          </option>
        ))}
      </SelectField>
      <div className="mt-4 flex flex-col gap-2">
        <ErrorNote error={start.error} />
        {runId && (
          <>
            <RunProgress
              key={runId}
              runId={runId}
              onOver={() => {
                setOver(true);
                void refreshPlans(client);
              }}
            />
            <AssignmentOutcome runId={runId} />
          </>
        )}
      </div>
    </Dialog>
  );
}

interface ChoiceProps {
  name: string;
  checked: boolean;
  onChoose: () => void;
  title: string;
  children: React.ReactNode;
}

function Choice({ name, checked, onChoose, title, children }: ChoiceProps) {
  return (
    <label className="flex items-start gap-2.5">
      <input
        type="radio"
        name={name}
        checked={checked}
        onChange={onChoose}
        className="mt-0.5 size-4 accent-accent"
      />
      <span>
        <span className="block text-body font-medium">{title}</span>
        <span className="block text-ink-muted">{children}</span>
      </span>
    </label>
  );
}
