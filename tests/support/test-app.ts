import { readFileSync } from 'node:fs';
import { pino } from 'pino';
import request from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { createApp, type App } from '../../server/app.ts';
import { SettableClock } from '../../server/clock.ts';
import type { Deps } from '../../server/deps.ts';
import { readEnv } from '../../server/env.ts';
import { EventBus } from '../../server/events.ts';
import { ComputePool } from '../../server/jobs/compute-pool.ts';
import { uploadElementSets } from '../../server/modules/element-sets/upload.service.ts';
import { migrate, openDatabase } from '../../server/orm.ts';
import { moveEpoch } from '../../server/seeders/write-tle.ts';
import { readElementSets } from '../../shared/orbit/element-reader.ts';
import { HOUR_MS } from '../../shared/time.ts';
import { buildSmallWorld, emailOf, PASSWORD, type SmallWorld, type Who } from './small-world.ts';

/** An ordinary hour of an ordinary day. */
export const NOW = Date.parse('2026-12-01T09:00:00.000Z');

export interface TestApp extends SmallWorld {
  app: App;
  deps: Deps;
  clock: SettableClock;
  /** A browser of that person, signed in. */
  as(who: Who): Promise<TestAgent>;
  /** Sets the clock; who was signed in has to sign in again. */
  at(nowMs: number): void;
  /** A browser of nobody. */
  anyone(): TestAgent;
  close(): Promise<void>;
}

export const newDeps = async (clock: SettableClock, file = ':memory:'): Promise<Deps> => {
  const orm = await openDatabase(file);
  await migrate(orm);
  return {
    orm,
    clock,
    env: readEnv({ NODE_ENV: 'test', LOG_LEVEL: 'silent', DATABASE_FILE: file }),
    log: pino({ level: process.env.TEST_LOG ?? 'silent' }),
    bus: new EventBus(),
    pool: new ComputePool(),
  };
};

/** The whole server on a database of its own in memory, with the small world and a clock that stands still. */
export const startTestApp = async (nowMs = NOW): Promise<TestApp> => {
  const clock = new SettableClock(nowMs);
  const deps = await newDeps(clock);
  const app = createApp(deps);
  const world = await buildSmallWorld(deps);
  const agents = new Map<Who, TestAgent>();
  return {
    ...world,
    app,
    deps,
    clock,
    at: (nowMs) => {
      clock.set(nowMs);
      agents.clear();
    },
    anyone: () => request.agent(app.http),
    as: async (who) => {
      const known = agents.get(who);
      if (known) return known;
      const agent = request.agent(app.http);
      await agent
        .post('/api/session')
        .send({ email: emailOf(who), password: PASSWORD })
        .expect(201);
      agents.set(who, agent);
      return agent;
    },
    close: async () => {
      app.streams.stop();
      await app.jobs.stop();
      await deps.pool.close();
      await deps.orm.close(true);
    },
  };
};

/** The demo's sets of some catalogue numbers, as a file with a fresh epoch. */
export const freshFile = (
  numbers: readonly number[],
  epochMs: number,
  anomalyShiftDeg = 0,
): { bytes: Buffer; fileName: string } => {
  const sets = readElementSets(readFileSync('tle/demo.tle'), 'demo.tle').accepted;
  const text = sets
    .filter((set) => numbers.includes(set.catalogNumber))
    .map((set) => {
      const { line1, line2 } = moveEpoch(set, epochMs, { anomalyShiftDeg });
      return `${set.name ?? ''}\n${line1}\n${line2}\n`;
    })
    .join('');
  return { bytes: Buffer.from(text), fileName: 'fresh.tle' };
};

/** Gives the small world element sets and waits for its passes. */
export const predictSmallWorld = async (test: TestApp): Promise<void> => {
  const file = freshFile([91001, 91002, 91014, 91015], test.clock.now() - 6 * HOUR_MS);
  await uploadElementSets(test.deps, test.people.operator, {
    file,
    dryRun: false,
    useFromMs: null,
  });
  await test.app.jobs.idle();
};
