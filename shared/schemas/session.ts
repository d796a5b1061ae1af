import { z } from 'zod';
import { Id, Instant } from './common.ts';

export const Role = z.enum(['operator', 'scheduler', 'lead', 'administrator']);
export type Role = z.infer<typeof Role>;

export const SignIn = z.strictObject({
  email: z.email().max(254),
  password: z.string().min(1).max(256),
});
export type SignIn = z.infer<typeof SignIn>;

export const SessionUser = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  roles: z.array(Role),
  /** Missions this person leads. */
  leadsMissionIds: z.array(Id),
});
export type SessionUser = z.infer<typeof SessionUser>;

/** `user: null` without a session. `permissions` are those that do not depend on an object's state. */
export const Session = z.strictObject({
  user: SessionUser.nullable(),
  permissions: z.array(z.string()),
  expiresUtc: Instant.nullable(),
  serverTimeUtc: Instant,
  demo: z
    .strictObject({
      accounts: z.array(z.strictObject({ role: z.string(), email: z.string() })),
      password: z.string(),
      seededUtc: Instant,
    })
    .nullable(),
});
export type Session = z.infer<typeof Session>;
