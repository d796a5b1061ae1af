import { z } from 'zod';

/** The secret of the demo; known to everybody, so it guards nothing that matters. */
export const DEMO_SECRET = 'skysheaf-demo-secret-known-to-everybody-0000';

const Env = z.object({
  NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(3000),
  HOST: z.string().min(1).default('127.0.0.1'),
  DATABASE_FILE: z.string().min(1).default('./data/skysheaf.sqlite'),
  APP_SECRET: z.string().min(32, 'must be at least 32 characters').default(DEMO_SECRET),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }).optional(),
  MAIL_FROM: z.string().default('Skysheaf <plans@skysheaf.example>'),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  CLOCK_START: z.iso.datetime().optional(),
  SEED_DEMO: z.enum(['yes', 'no']).default('yes'),
});
export type Env = z.infer<typeof Env>;

/** Reads the environment; a wrong value ends the start with one readable line each. */
export const readEnv = (source: Record<string, string | undefined>): Env => {
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ''));
  const result = Env.safeParse(given);
  if (result.success) return result.data;
  const lines = result.error.issues.map(
    (issue) => `  ${issue.path.join('.')}: ${issue.message} (see .env.example)`,
  );
  throw new StartError(`The environment is not usable:\n${lines.join('\n')}`);
};

/** A reason not to start that a person can act on; shown without a stack. */
export class StartError extends Error {
  override name = 'StartError';
}
