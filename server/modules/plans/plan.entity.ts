import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { PlanState, Score } from '../../../shared/schemas/plan.ts';
import { Station } from '../stations/station.entity.ts';

/** One revision of the plan of one station and UTC day. */
export const DayPlan = defineEntity({
  name: 'DayPlan',
  tableName: 'day_plans',
  uniques: [{ properties: ['station', 'day', 'revision'] }],
  properties: {
    id: p.uuid().primary(),
    station: () => p.manyToOne(Station),
    /** `2026-12-02`. */
    day: p.string().index(),
    revision: p.integer(),
    /** Counts changes of the plan's own content; the tag that every reader sees. */
    contentVersion: p.integer().default(1),
    state: p.string().$type<PlanState>().index(),
    limitOfDayDb: p.float(),
    /** As it was at the last change of the content; lists show it. */
    score: p.json().$type<Score>(),
    needsAttention: p.text().nullable(),
    /** A revision of this day has been in review: assignment repairs from now on. */
    hasBeenReviewed: p.boolean().default(false),
    createdMs: p.integer(),
    updatedMs: p.integer(),
    createdById: p.uuid().nullable(),
    submittedById: p.uuid().nullable(),
    submittedByName: p.string().nullable(),
    releasedMs: p.integer().nullable(),
    /** Names of missions and satellites as they were at release. */
    releasedNames: p.json().$type<Record<string, string>>().nullable(),
    missingSignaturesReason: p.text().nullable(),
    operational: p.json().$type<OperationalNote>().nullable(),
  },
});
export type DayPlan = InferEntity<typeof DayPlan>;

/** Why a revision of the running day was released at once. */
export interface OperationalNote {
  kind: string;
  reason: string;
  caller: string;
  byName: string;
  atMs: number;
}
