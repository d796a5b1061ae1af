import type { NextFunction, Request, Response } from 'express';
import { reader, type Deps, type Person } from '../deps.ts';
import { ledMissionIds } from '../modules/missions/mission.service.ts';
import { cookieName } from '../modules/sessions/session.routes.ts';
import { findSession } from '../modules/sessions/session.service.ts';

/** The person behind a session token with the missions that person leads now, or null. */
export const findPersonWithExpiry = async (
  deps: Deps,
  token: string,
): Promise<{ person: Person; expiresMs: number } | null> => {
  const live = await findSession(deps, token);
  if (!live) return null;
  const { user, session } = live;
  const person = {
    id: user.id,
    name: user.name,
    email: user.email,
    roles: user.roles,
    leadsMissionIds: user.roles.includes('lead') ? await ledMissionIds(reader(deps), user.id) : [],
    sessionId: session.id,
  };
  return { person, expiresMs: session.expiresMs };
};

/** Puts the person on the request; whether one is needed is each route's matter. */
export const identify =
  (deps: Deps) =>
  async (request: Request, _response: Response, next: NextFunction): Promise<void> => {
    const cookies = request.cookies as Record<string, unknown> | undefined;
    const token = cookies?.[cookieName(deps)];
    if (typeof token === 'string') {
      const found = await findPersonWithExpiry(deps, token);
      if (found) {
        request.person = found.person;
        request.sessionExpiresMs = found.expiresMs;
      }
    }
    next();
  };
