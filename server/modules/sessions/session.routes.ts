import type { Request, Response } from 'express';
import { rateLimit, ipKeyGenerator } from 'express-rate-limit';
import { z } from 'zod';
import { permissionsOf } from '../../../shared/policy.ts';
import { Session as SessionAnswer, SignIn } from '../../../shared/schemas/session.ts';
import { MINUTE_MS, toIso } from '../../../shared/time.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import { AppError } from '../../errors.ts';
import { route } from '../../middleware/route.ts';
import { Setting } from '../users/setting.entity.ts';
import { signIn, signOut } from './session.service.ts';

/** What the seeder leaves behind for the sign-in page of a demo database. */
export const DemoSetting = z.object({
  seededMs: z.number(),
  password: z.string(),
  accounts: z.array(z.object({ role: z.string(), email: z.string() })),
});

export const cookieName = (deps: Deps): string => (isHttps(deps) ? '__Host-skysheaf' : 'skysheaf');
const isHttps = (deps: Deps): boolean => deps.env.PUBLIC_URL?.startsWith('https:') ?? false;

const cookieOptions = (deps: Deps) =>
  ({ httpOnly: true, sameSite: 'lax', secure: isHttps(deps), path: '/' }) as const;

/** Ten failed tries per account and address in a quarter of an hour. */
export const signInLimit = () =>
  rateLimit({
    windowMs: 15 * MINUTE_MS,
    limit: 10,
    skipSuccessfulRequests: true,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    keyGenerator: (request: Request) => {
      const body: unknown = request.body;
      const email =
        typeof body === 'object' && body !== null && 'email' in body ? String(body.email) : '';
      return `${ipKeyGenerator(request.ip ?? '')} ${email.toLowerCase().slice(0, 254)}`;
    },
    handler: (_request, _response, next) =>
      next(
        new AppError(
          429,
          'too-many-tries',
          'Ten tries failed. Wait a quarter of an hour, or ask an administrator for a new password.',
        ),
      ),
  });

export type FindPerson = (deps: Deps, sessionToken: string) => Promise<Person | null>;

const presentSession = async (deps: Deps, person: Person | null, expiresMs: number | null) => {
  const demo = await reader(deps).findOne(Setting, { key: 'demo' });
  const known = demo ? DemoSetting.parse(demo.value) : null;
  return {
    user: person && {
      id: person.id,
      name: person.name,
      email: person.email,
      roles: [...person.roles],
      leadsMissionIds: [...person.leadsMissionIds],
    },
    permissions: person ? permissionsOf(person) : [],
    expiresUtc: expiresMs === null ? null : toIso(expiresMs),
    serverTimeUtc: toIso(deps.clock.now()),
    demo: known && {
      accounts: known.accounts,
      password: known.password,
      seededUtc: toIso(known.seededMs),
    },
  } satisfies SessionAnswer;
};

export const sessionRoutes = (deps: Deps, findPerson: FindPerson) => [
  route({
    method: 'post',
    path: '/session',
    summary: 'Sign in; sets the session cookie',
    access: 'public',
    body: SignIn,
    answer: SessionAnswer,
    status: 201,
    handler: async ({ body, response }) => {
      const signed = await signIn(deps, body);
      setCookie(deps, response, signed.token);
      const person = await findPerson(deps, signed.token);
      return { body: await presentSession(deps, person, signed.expiresMs) };
    },
  }),
  route({
    method: 'get',
    path: '/session',
    summary: 'Who am I, with permissions; user is null without a session',
    access: 'public',
    answer: SessionAnswer,
    handler: async ({ request }) => ({
      body: await presentSession(deps, request.person ?? null, request.sessionExpiresMs ?? null),
    }),
  }),
  route({
    method: 'delete',
    path: '/session',
    summary: 'Sign out; the session ends on the server',
    access: 'public',
    handler: async ({ request, response }) => {
      if (request.person) await signOut(deps, request.person);
      response.clearCookie(cookieName(deps), cookieOptions(deps));
      return { status: 204 };
    },
  }),
];

const setCookie = (deps: Deps, response: Response, token: string): void => {
  response.cookie(cookieName(deps), token, cookieOptions(deps));
};
