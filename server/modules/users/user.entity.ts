import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { Role } from '../../../shared/schemas/session.ts';

export const User = defineEntity({
  name: 'User',
  tableName: 'users',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    name: p.string(),
    /** Lower case; the account's name. */
    email: p.string().unique(),
    /** PHC string of Argon2id. */
    passwordHash: p.string(),
    roles: p.json().$type<Role[]>(),
    disabled: p.boolean().default(false),
    createdMs: p.integer(),
  },
});
export type User = InferEntity<typeof User>;
