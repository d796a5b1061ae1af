import { z } from 'zod';
import { Id, Instant, page } from './common.ts';

export const RunResult = z.looseObject({
  objective: z.number().optional(),
  bound: z.number().nullable().optional(),
  gap: z.number().nullable().optional(),
  assigned: z.number().optional(),
  open: z.number().optional(),
  applied: z.boolean().optional(),
  /** What a scheduler reads: "proven best", "at most 0.3 % from the best". */
  words: z.string().optional(),
});
export const Run = z.strictObject({
  id: Id,
  kind: z.enum(['prediction', 'assignment']),
  state: z.enum(['queued', 'running', 'succeeded', 'failed', 'cancelled']),
  progress: z.number().min(0).max(1),
  step: z.string(),
  planId: Id.nullable(),
  startedBy: z.string(),
  createdUtc: Instant,
  finishedUtc: Instant.nullable(),
  result: RunResult.nullable(),
  error: z.strictObject({ code: z.string(), detail: z.string() }).nullable(),
});
export type Run = z.infer<typeof Run>;
export const RunPage = page(Run);
export const RunStarted = z.strictObject({ runId: Id });
export const CreateAssignmentRun = z.strictObject({
  mode: z.enum(['new', 'repair']).default('new'),
  timeLimitSeconds: z.number().min(1).max(120).default(20),
});
export type CreateAssignmentRun = z.infer<typeof CreateAssignmentRun>;
