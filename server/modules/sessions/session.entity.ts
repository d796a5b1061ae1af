import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { User } from '../users/user.entity.ts';

/** The row that a session token names; ending it ends the access at once. */
export const SessionRow = defineEntity({
  name: 'SessionRow',
  tableName: 'sessions',
  properties: {
    id: p.uuid().primary(),
    user: () => p.manyToOne(User).deleteRule('cascade'),
    createdMs: p.integer(),
    lastSeenMs: p.integer(),
    expiresMs: p.integer(),
    endedMs: p.integer().nullable(),
  },
});
export type SessionRow = InferEntity<typeof SessionRow>;
