import { useCallback, useMemo, useState } from 'react';
import type { Edit } from '../../../../shared/schemas/edit.ts';
import type { Plan } from '../../../../shared/schemas/plan.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { useEditPlan } from '../../../queries/plan-queries.ts';
import type { ApplyOptions, PlanDialog, PlanEdits } from './plan-edits.ts';

interface Step {
  edits: Edit[];
  words: string;
}
const MOST_STEPS = 100;

/** Edits with undo and redo: every edit answers the edits that take it back. */
export function useEditState(plan: Plan): {
  edits: PlanEdits;
  error: Error | null;
  clearError: () => void;
} {
  const { mutate, isPending, error, reset } = useEditPlan();
  const announce = useAnnounce();
  const [undoSteps, setUndo] = useState<Step[]>([]);
  const [redoSteps, setRedo] = useState<Step[]>([]);
  const [dialog, setDialog] = useState<PlanDialog | null>(null);
  const [runId, setRunId] = useState<string | null>(null);
  const { id, version } = plan;

  const send = useCallback(
    (step: Step, after: (inverse: Step) => void, options: ApplyOptions = {}) => {
      mutate(
        { plan: { id, version: options.version ?? version }, edits: step.edits },
        {
          onSuccess: (done) => {
            after({ edits: done.inverse, words: step.words });
            options.onDone?.();
          },
        },
      );
    },
    [mutate, id, version],
  );
  const apply = useCallback(
    (edits: Edit[], words: string, options?: ApplyOptions) => {
      const keep = (inverse: Step): void => {
        setUndo((steps) => [...steps.slice(-MOST_STEPS), inverse]);
        setRedo([]);
        announce(words);
      };
      send({ edits, words }, keep, options);
    },
    [send, announce],
  );
  const undo = useCallback(() => {
    const step = undoSteps.at(-1);
    if (!step) return;
    send(step, (inverse) => {
      setUndo((steps) => steps.slice(0, -1));
      setRedo((steps) => [...steps, inverse]);
      announce(`Taken back: ${step.words}`);
    });
  }, [undoSteps, send, announce]);
  const redo = useCallback(() => {
    const step = redoSteps.at(-1);
    if (!step) return;
    send(step, (inverse) => {
      setRedo((steps) => steps.slice(0, -1));
      setUndo((steps) => [...steps, inverse]);
      announce(`Done again: ${step.words}`);
    });
  }, [redoSteps, send, announce]);

  const edits = useMemo(
    (): PlanEdits => ({
      apply,
      undo,
      redo,
      canUndo: undoSteps.length > 0 && !isPending,
      canRedo: redoSteps.length > 0 && !isPending,
      isBusy: isPending,
      dialog,
      open: setDialog,
      close: () => setDialog(null),
      runId,
      setRunId,
    }),
    [apply, undo, redo, undoSteps.length, redoSteps.length, isPending, dialog, runId],
  );
  return { edits, error, clearError: reset };
}
