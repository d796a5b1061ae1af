import { randomUUID } from 'node:crypto';
import { HOUR_MS, MINUTE_MS } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import { AppError } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { User } from '../users/user.entity.ts';
import { verifyPassword } from './password.ts';
import { SessionRow } from './session.entity.ts';
import { readToken, signToken } from './token.ts';

/** A shift and its hand-over. */
const ABSOLUTE_MS = 12 * HOUR_MS;
const IDLE_MS = 4 * HOUR_MS;
/** "Last seen" is written at most this often. */
const TOUCH_MS = 5 * MINUTE_MS;

export interface SignedIn {
  token: string;
  expiresMs: number;
  userId: string;
  sessionId: string;
}

/** The same answer, after the same time, for an unknown account, a wrong password and a disabled account. */
export const signIn = async (
  deps: Deps,
  { email, password }: { email: string; password: string },
): Promise<SignedIn> => {
  const user = await reader(deps).findOne(User, { email: email.trim().toLowerCase() });
  const right = await verifyPassword(user?.passwordHash ?? null, password);
  if (!user || !right || user.disabled) {
    deps.log.warn({ email }, 'sign-in refused');
    throw new AppError(401, 'wrong-credentials', 'E-mail or password is wrong.');
  }
  return inTransaction(deps, async (work) => {
    const session = work.em.create(SessionRow, {
      id: randomUUID(),
      user: user.id,
      createdMs: work.nowMs,
      lastSeenMs: work.nowMs,
      expiresMs: work.nowMs + ABSOLUTE_MS,
    });
    await work.em.flush();
    await audit(work, user, {
      action: 'session.open',
      entity: 'session',
      entityId: session.id,
      summary: `${user.name} signed in`,
    });
    return {
      token: signToken(session.id, session.expiresMs, deps.env.APP_SECRET),
      expiresMs: session.expiresMs,
      userId: user.id,
      sessionId: session.id,
    };
  });
};

export const signOut = (deps: Deps, person: Person): Promise<void> =>
  inTransaction(deps, async (work) => {
    if (!person.sessionId) return;
    await work.em.nativeUpdate(SessionRow, { id: person.sessionId }, { endedMs: work.nowMs });
    await audit(work, person, {
      action: 'session.close',
      entity: 'session',
      entityId: person.sessionId,
      summary: `${person.name} signed out`,
    });
    work.tell({ topic: 'session-ended', id: person.sessionId, version: 1 });
  });

/** Ends every session of a person: after disabling, a new password or other roles. */
export const endSessionsOf = async (work: Work, userId: string): Promise<void> => {
  const open = await work.em.find(SessionRow, { user: userId, endedMs: null });
  for (const session of open) {
    session.endedMs = work.nowMs;
    work.tell({ topic: 'session-ended', id: session.id, version: 1 });
  }
};

export interface LiveSession {
  session: SessionRow;
  user: User;
}

/** The session that a token names, if it is open and its person may still come in. */
export const findSession = async (deps: Deps, token: string): Promise<LiveSession | null> => {
  const nowMs = deps.clock.now();
  const id = readToken(token, deps.env.APP_SECRET, nowMs);
  if (!id) return null;
  const em = reader(deps);
  const session = await em.findOne(SessionRow, id, { populate: ['user'] });
  const isOpen =
    session &&
    !session.endedMs &&
    nowMs < session.expiresMs &&
    nowMs < session.lastSeenMs + IDLE_MS;
  if (!isOpen) return null;
  const user = await em.findOneOrFail(User, session.user.id);
  if (user.disabled) return null;
  if (nowMs - session.lastSeenMs > TOUCH_MS) {
    session.lastSeenMs = nowMs;
    await em.flush();
  }
  return { session, user };
};
