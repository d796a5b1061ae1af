import { defineEntity, p, type InferEntity } from '@mikro-orm/core';

export type RunKind = 'prediction' | 'assignment';
export type RunState = 'queued' | 'running' | 'succeeded' | 'failed' | 'cancelled';

/** Background work with progress. `planId` is no reference: runs stand left of plans in the line of modules. */
export const RunRow = defineEntity({
  name: 'RunRow',
  tableName: 'runs',
  properties: {
    id: p.uuid().primary(),
    kind: p.string().$type<RunKind>(),
    state: p.string().$type<RunState>().default('queued').index(),
    progress: p.float().default(0),
    step: p.string().default(''),
    planId: p.uuid().nullable().index(),
    /** Version of the plan that an assignment read. */
    planVersion: p.integer().nullable(),
    input: p.json().$type<Record<string, unknown>>(),
    result: p.json().$type<Record<string, unknown>>().nullable(),
    /** What an assignment proposes, kept until it is applied. */
    proposal: p.json().$type<Record<string, unknown>>().nullable(),
    error: p.json().$type<{ code: string; detail: string }>().nullable(),
    startedById: p.uuid().nullable(),
    startedByName: p.string(),
    createdMs: p.integer().index(),
    finishedMs: p.integer().nullable(),
  },
});
export type RunRow = InferEntity<typeof RunRow>;
