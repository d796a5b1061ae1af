import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { CreateUser, PatchUser } from '../../../shared/schemas/user.ts';
import { inTransaction, type Deps, type Person } from '../../deps.ts';
import { conflict, notFound } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { audit } from '../audit/audit.service.ts';
import { endSessionsOf } from '../sessions/session.service.ts';
import { hashPassword } from '../sessions/password.ts';
import { User } from './user.entity.ts';

export const listUsers = (em: EntityManager, wish: PageWish) =>
  listPage<User>(em, User, wish, { sort: 'name' });

export const getUser = async (em: EntityManager, id: string): Promise<User> => {
  const user = await em.findOne(User, id);
  if (!user) throw notFound('The person');
  return user;
};

export const createUser = async (deps: Deps, person: Person, wish: CreateUser): Promise<User> => {
  const passwordHash = await hashPassword(wish.password);
  return inTransaction(deps, async (work) => {
    const email = wish.email.toLowerCase();
    if (await work.em.findOne(User, { email }))
      throw conflict('email-taken', `${email} has an account already.`);
    const user = work.em.create(User, {
      id: randomUUID(),
      name: wish.name,
      email,
      passwordHash,
      roles: wish.roles,
      createdMs: work.nowMs,
    });
    await work.em.flush();
    await audit(work, person, {
      action: 'user.create',
      entity: 'user',
      entityId: user.id,
      summary: `Account of ${user.name} with the roles ${user.roles.join(', ')}`,
    });
    work.tell({ topic: 'fleet', id: user.id, version: user.version });
    return user;
  });
};

/** An administrator must remain; otherwise nobody could ever repair it. */
const keepAnAdministrator = async (em: EntityManager, user: User): Promise<void> => {
  const all = await em.find(User, { disabled: false });
  const left = all.some((one) => !one.disabled && one.roles.includes('administrator'));
  if (!left)
    throw conflict('last-administrator', `${user.name} is the last administrator in service.`);
};

export const patchUser = async (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchUser; ifMatch: string },
): Promise<User> => {
  const passwordHash = wish.password ? await hashPassword(wish.password) : null;
  return inTransaction(deps, async (work) => {
    const user = await getUser(work.em, id);
    checkTag(ifMatch, user.id, user.version, 'The account');
    if (wish.name !== undefined) user.name = wish.name;
    if (wish.roles !== undefined) user.roles = wish.roles;
    if (wish.disabled !== undefined) user.disabled = wish.disabled;
    if (passwordHash) user.passwordHash = passwordHash;
    await work.em.flush();
    await keepAnAdministrator(work.em, user);
    if (user.disabled || passwordHash) await endSessionsOf(work, user.id);
    await work.em.flush();
    await audit(work, person, {
      action: 'user.change',
      entity: 'user',
      entityId: user.id,
      summary: `Account of ${user.name} changed`,
      details: { roles: user.roles, disabled: user.disabled, newPassword: passwordHash !== null },
    });
    work.tell({ topic: 'fleet', id: user.id, version: user.version });
    return user;
  });
};
