import { z } from 'zod';
import { Id, Instant, Name, Version, page } from './common.ts';
import { Role } from './session.ts';

export const User = z.strictObject({
  id: Id,
  version: Version,
  name: Name,
  email: z.string(),
  roles: z.array(Role),
  disabled: z.boolean(),
  createdUtc: Instant,
});
export type User = z.infer<typeof User>;
export const UserPage = page(User);

const password = z.string().min(12, 'At least 12 characters').max(256);

export const CreateUser = z.strictObject({
  name: Name,
  email: z.email().max(254),
  roles: z.array(Role).min(1, 'Give at least one role').max(4),
  password,
});
export type CreateUser = z.infer<typeof CreateUser>;

export const PatchUser = z.strictObject({
  name: Name.optional(),
  roles: z.array(Role).min(1).max(4).optional(),
  disabled: z.boolean().optional(),
  password: password.optional(),
});
export type PatchUser = z.infer<typeof PatchUser>;
