import { useQuery } from '@tanstack/react-query';
import { Button } from '../../../components/button.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { counted } from '../../../lib/format-number.ts';
import { tagOf } from '../../../lib/api-client.ts';
import { runIsOver, runQueries, useApplyRun } from '../../../queries/run-queries.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';

/** What an assignment found, in words; how near to the best that is; whether it stands on the plan. */
export function AssignmentOutcome({ runId }: { runId: string }) {
  const run = useQuery(runQueries.one(runId)).data;
  const { plan } = usePlanDesk();
  const apply = useApplyRun();
  if (!run || !runIsOver(run) || !run.result) return null;
  const { assigned, open, words, applied, gap } = run.result;
  const nearness =
    words ??
    (gap === null || gap === undefined
      ? 'no bound is known'
      : gap === 0
        ? 'proven best'
        : `at most ${(gap * 100).toFixed(1)} % from the best`);
  return (
    <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-1">
      <p>
        {assigned !== undefined && (
          <strong className="font-semibold">{counted(assigned, 'contact')}</strong>
        )}
        {open !== undefined && `, ${counted(open, 'pass', 'passes')} left open`}:{' '}
        {nearness.replace(/\.$/, '')}.
      </p>
      {applied === false && (
        <>
          <p className="text-warn-text">It does not stand on the plan yet.</p>
          <Button
            size="small"
            busy={apply.isPending}
            onClick={() => apply.mutate({ id: runId, ifMatch: tagOf(plan) })}
          >
            Put it on the plan
          </Button>
        </>
      )}
      <ErrorNote error={apply.error} />
    </div>
  );
}
