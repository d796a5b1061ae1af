import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { RequestModel, RequirementModel } from '../../../shared/schedule/model.ts';
import { Mission } from '../missions/mission.entity.ts';
import { User } from '../users/user.entity.ts';
import type { MissionPart } from './mission-part.ts';
import { DayPlan } from './plan.entity.ts';

/** One submission; what was asked then is copied into it, so a lead judges what was asked then. */
export const Round = defineEntity({
  name: 'Round',
  tableName: 'sign_off_rounds',
  uniques: [{ properties: ['plan', 'number'] }],
  properties: {
    id: p.uuid().primary(),
    plan: () => p.manyToOne(DayPlan).deleteRule('cascade'),
    number: p.integer(),
    requirements: p.json().$type<RequirementModel[]>(),
    requests: p.json().$type<RequestModel[]>(),
    submittedById: p.uuid().nullable(),
    submittedByName: p.string(),
    submittedMs: p.integer(),
    closedMs: p.integer().nullable(),
    outcome: p.string().$type<'approved' | 'returned' | 'withdrawn' | 'released'>().nullable(),
  },
});
export type Round = InferEntity<typeof Round>;

export type SignOffState = 'pending' | 'approved' | 'unchanged' | 'returned';

/** A mission's answer in a round, bound to the mission's own part of the plan. */
export const SignOffRow = defineEntity({
  name: 'SignOffRow',
  tableName: 'sign_offs',
  uniques: [{ properties: ['round', 'mission'] }],
  properties: {
    id: p.uuid().primary(),
    round: () => p.manyToOne(Round).deleteRule('cascade'),
    mission: () => p.manyToOne(Mission),
    state: p.string().$type<SignOffState>().default('pending'),
    by: () => p.manyToOne(User).nullable(),
    byName: p.string().nullable(),
    atMs: p.integer().nullable(),
    comment: p.text().nullable(),
    /** The part that was signed; the signature stands while it stands. */
    part: p.json().$type<MissionPart>().nullable(),
    digest: p.string().nullable(),
  },
});
export type SignOffRow = InferEntity<typeof SignOffRow>;
