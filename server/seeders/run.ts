/**
 * `npm run seed`: the demo, on an empty database.
 * `npm run seed -- administrator "Name" mail@address`: the first administrator of a database of one's own;
 * the password is read from ADMIN_PASSWORD.
 */
import { randomUUID } from 'node:crypto';
import { pino } from 'pino';
import { CreateUser } from '../../shared/schemas/user.ts';
import { systemClock } from '../clock.ts';
import type { Deps } from '../deps.ts';
import { readEnv, StartError } from '../env.ts';
import { EventBus } from '../events.ts';
import { ComputePool } from '../jobs/compute-pool.ts';
import { hashPassword } from '../modules/sessions/password.ts';
import { User } from '../modules/users/user.entity.ts';
import { empty, migrate, openDatabase } from '../orm.ts';
import { databaseKind } from './database-kind.ts';
import { seedDemo } from './demo.ts';

const addAdministrator = async (deps: Deps, [name, email]: string[]): Promise<void> => {
  const wish = CreateUser.safeParse({
    name,
    email,
    roles: ['administrator'],
    password: process.env.ADMIN_PASSWORD,
  });
  if (!wish.success) throw new StartError(wish.error.issues.map((one) => one.message).join('; '));
  const em = deps.orm.em.fork();
  em.create(User, {
    id: randomUUID(),
    name: wish.data.name,
    email: wish.data.email.toLowerCase(),
    passwordHash: await hashPassword(wish.data.password),
    roles: wish.data.roles,
    createdMs: deps.clock.now(),
  });
  await em.flush();
  console.log(`${wish.data.email} is an administrator now.`);
};

const run = async (): Promise<void> => {
  const env = readEnv(process.env);
  const orm = await openDatabase(env.DATABASE_FILE);
  const deps: Deps = {
    orm,
    clock: systemClock,
    env,
    log: pino({ level: env.LOG_LEVEL }),
    bus: new EventBus(),
    pool: new ComputePool(),
  };
  try {
    await migrate(orm);
    const kind = await databaseKind(orm);
    const [what, ...rest] = process.argv.slice(2);
    if (kind === 'half-seeded') await empty(orm);
    else if (kind !== 'empty')
      throw new StartError(
        `${env.DATABASE_FILE} is not empty (${kind}). To begin the demo again, stop the server, move that file and its -wal away, and seed.`,
      );
    if (what === 'administrator') await addAdministrator(deps, rest);
    else await seedDemo(deps);
    console.log(`${env.DATABASE_FILE} is ready.`);
  } finally {
    await deps.pool.close();
    await orm.close(true);
  }
};

run().catch((error: unknown) => {
  console.error(error instanceof StartError ? error.message : error);
  process.exitCode = 1;
});
