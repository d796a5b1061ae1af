import { createServer } from 'node:http';
import { resolve } from 'node:path';
import { createTransport } from 'nodemailer';
import { pino } from 'pino';
import { createApp } from './app.ts';
import { clockFrom, systemClock, type Clock } from './clock.ts';
import type { Deps } from './deps.ts';
import { DEMO_SECRET, readEnv, StartError, type Env } from './env.ts';
import { EventBus } from './events.ts';
import { ComputePool } from './jobs/compute-pool.ts';
import { activateCandidates } from './modules/element-sets/element-set.service.ts';
import { startLocalSmtp } from './modules/mail/local-smtp.ts';
import { MailSender } from './modules/mail/mail-sender.ts';
import { empty, migrate, openDatabase } from './orm.ts';
import { seedDemo } from './seeders/demo.ts';
import { databaseKind, type DatabaseKind } from './seeders/database-kind.ts';

/** Candidates whose time has come are looked for this often. */
const CANDIDATES_MS = 30_000;
/** Longer than any request; then the process ends whatever is left. */
const STOP_MS = 10_000;

const chooseClock = (env: Env): Clock =>
  env.CLOCK_START ? clockFrom(Date.parse(env.CLOCK_START)) : systemClock;

/** What guards nothing on a demo must not guard a real database. */
const refuseDemoSettings = (env: Env, kind: DatabaseKind): void => {
  const isReal = kind === 'real' || (kind === 'empty' && env.SEED_DEMO === 'no');
  if (env.NODE_ENV !== 'production' || !isReal) return;
  if (env.APP_SECRET === DEMO_SECRET)
    throw new StartError(
      'This database is not the demo, so it needs a secret of its own: set APP_SECRET (32 characters or more).',
    );
  if (env.CLOCK_START)
    throw new StartError('CLOCK_START is for the demo and tests; this database is not the demo.');
};

const start = async (): Promise<void> => {
  const env = readEnv(process.env);
  const log = pino({ level: env.LOG_LEVEL });
  const orm = await openDatabase(env.DATABASE_FILE);
  await migrate(orm);
  let kind = await databaseKind(orm);
  if (kind === 'half-seeded') {
    log.warn('the seeding of the demo was cut off: it begins again');
    await empty(orm);
    kind = 'empty';
  }
  refuseDemoSettings(env, kind);

  const deps: Deps = {
    orm,
    clock: chooseClock(env),
    env,
    log,
    bus: new EventBus(),
    pool: new ComputePool(),
  };
  if (kind === 'empty' && env.SEED_DEMO === 'yes') {
    log.info('the database is empty: seeding the demo');
    await seedDemo(deps);
  }

  const app = createApp(deps, { clientFolder: resolve('dist/client') });
  await app.jobs.recover();
  const smtp = env.SMTP_URL ? null : await startLocalSmtp();
  const sender = new MailSender(deps, createTransport(env.SMTP_URL ?? smtp?.url ?? ''));
  sender.start();
  const candidates = setInterval(
    () => void activateCandidates(deps).catch((error: unknown) => log.error({ err: error })),
    CANDIDATES_MS,
  );

  const server = createServer(app.http);
  await new Promise<void>((done, fail) => {
    server.once('error', fail);
    server.listen(env.PORT, env.HOST, done);
  });
  log.info(`Skysheaf answers on ${env.PUBLIC_URL ?? `http://localhost:${env.PORT}`}`);

  const stop = async (): Promise<void> => {
    setTimeout(() => process.exit(1), STOP_MS).unref();
    clearInterval(candidates);
    app.streams.stop();
    await new Promise<void>((done) => {
      server.close(() => done());
      server.closeIdleConnections();
    });
    await app.jobs.stop();
    await sender.stop();
    await smtp?.close();
    await deps.pool.close();
    await orm.close(true);
    log.info('stopped');
    process.exit(0);
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void stop());
};

start().catch((error: unknown) => {
  if (error instanceof StartError) console.error(`Skysheaf does not start. ${error.message}`);
  else if (error instanceof Error && 'code' in error && error.code === 'EADDRINUSE')
    console.error(`Skysheaf does not start. The port is in use: ${error.message}`);
  else console.error(error);
  process.exit(1);
});
