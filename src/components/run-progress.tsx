import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import type { Run } from '../../shared/schemas/run.ts';
import { runIsOver, runQueries, useCancelRun } from '../queries/run-queries.ts';
import { Button } from './button.tsx';
import { ErrorNote } from './states.tsx';

interface Props {
  runId: string;
  onOver?: (run: Run) => void;
}

/** Background work as it goes: what is being done, how far, and a way to stop it. */
export function RunProgress({ runId, onOver }: Props) {
  const run = useQuery(runQueries.one(runId));
  const cancel = useCancelRun();
  const told = useRef<string | null>(null);
  useEffect(() => {
    if (!run.data || !runIsOver(run.data) || told.current === runId) return;
    told.current = runId;
    onOver?.(run.data);
  }, [run.data, runId, onOver]);
  if (run.isError) return <ErrorNote error={run.error} />;
  if (!run.data) return null;
  const { state, progress, step } = run.data;
  const percent = Math.round(progress * 100);
  return (
    <div className="flex items-center gap-3">
      <div className="min-w-0 flex-1">
        <p role="status" className="flex justify-between gap-3 text-table">
          <span>{runIsOver(run.data) ? WORDS[state] : step || 'Waiting'}</span>
          <span className="figures text-ink-muted">{percent} %</span>
        </p>
        <div
          role="progressbar"
          aria-label={step || 'Progress'}
          aria-valuenow={percent}
          aria-valuemin={0}
          aria-valuemax={100}
          className="mt-1 h-1.5 overflow-hidden rounded-full bg-shade"
        >
          <div
            className="h-full bg-accent transition-[width] duration-panel"
            style={{ width: `${percent}%` }}
          />
        </div>
        {run.data.error && (
          <p className="mt-1 text-caption text-danger-text">{run.data.error.detail}</p>
        )}
      </div>
      {!runIsOver(run.data) && (
        <Button size="small" busy={cancel.isPending} onClick={() => cancel.mutate(runId)}>
          Cancel
        </Button>
      )}
    </div>
  );
}

const WORDS: Record<Run['state'], string> = {
  queued: 'Waiting',
  running: 'Running',
  succeeded: 'Done',
  failed: 'Failed',
  cancelled: 'Cancelled',
};
