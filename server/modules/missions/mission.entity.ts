import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { User } from '../users/user.entity.ts';

export const Mission = defineEntity({
  name: 'Mission',
  tableName: 'missions',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    name: p.string().unique(),
    code: p.string().unique(),
    series: p.integer(),
    priority: p.integer(),
    retired: p.boolean().default(false),
  },
});
export type Mission = InferEntity<typeof Mission>;

export const MissionLead = defineEntity({
  name: 'MissionLead',
  tableName: 'mission_leads',
  uniques: [{ properties: ['mission', 'user'] }],
  properties: {
    id: p.uuid().primary(),
    mission: () => p.manyToOne(Mission).deleteRule('cascade'),
    user: () => p.manyToOne(User).deleteRule('cascade'),
    /** "Approve whenever my requirements are met." */
    standingConsent: p.boolean().default(false),
  },
});
export type MissionLead = InferEntity<typeof MissionLead>;
