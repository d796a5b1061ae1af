import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { Edit } from '../../../../shared/schemas/edit.ts';
import type { Violation } from '../../../../shared/schemas/problem.ts';
import { ApiError } from '../../../lib/api-error.ts';
import { judgeEdits, planQueries } from '../../../queries/plan-queries.ts';

export interface Judgement {
  state: 'idle' | 'judging' | 'holds' | 'broken' | 'failed';
  violations: readonly Violation[];
  error: Error | null;
}

const REST_MS = 250;

/** What the server would say to edits, asked when typing rests; nothing is changed. */
export function useJudgement(
  plan: { id: string; version: number },
  edits: Edit[] | null,
): Judgement {
  const key = edits ? JSON.stringify(edits) : null;
  const [rested, setRested] = useState<string | null>(null);
  useEffect(() => {
    const timer = window.setTimeout(() => setRested(key), REST_MS);
    return () => window.clearTimeout(timer);
  }, [key]);
  const query = useQuery({
    queryKey: [...planQueries.all, plan.id, 'judge', plan.version, rested],
    queryFn: ({ signal }) => judgeEdits(plan, edits ?? [], signal),
    enabled: rested !== null && rested === key,
    placeholderData: keepPreviousData,
    retry: false,
    staleTime: 30_000,
  });
  if (key === null) return { state: 'idle', violations: [], error: null };
  if (query.error) {
    const violations = query.error instanceof ApiError ? query.error.violations : [];
    return violations.length > 0
      ? { state: 'broken', violations, error: null }
      : { state: 'failed', violations, error: query.error };
  }
  if (rested !== key || query.isPlaceholderData || !query.data)
    return { state: 'judging', violations: query.data?.violations ?? [], error: null };
  const { violations } = query.data;
  return { state: violations.length > 0 ? 'broken' : 'holds', violations, error: null };
}
