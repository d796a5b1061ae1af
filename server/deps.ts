import type { EntityManager, MikroORM } from '@mikro-orm/sqlite';
import type { Logger } from 'pino';
import type { Actor } from '../shared/policy.ts';
import type { Clock } from './clock.ts';
import type { Env } from './env.ts';
import type { DomainEvent, EventBus } from './events.ts';
import type { ComputePool } from './jobs/compute-pool.ts';

/** What every service is made with. */
export interface Deps {
  orm: MikroORM;
  clock: Clock;
  env: Env;
  log: Logger;
  bus: EventBus;
  pool: ComputePool;
}

/** The person behind a request, or a part of the system that acts by itself. */
export interface Person extends Actor {
  name: string;
  email: string;
  sessionId: string | null;
}

/** One use case: its entity manager, and what to tell the world after the commit. */
export interface Work {
  em: EntityManager;
  nowMs: number;
  tell: (event: DomainEvent) => void;
}

/**
 * Runs a use case in one transaction. There is one connection: inside, nothing may be awaited but the given
 * `em` (anything else would wait for that connection for ever), so compute first and write here.
 */
export const inTransaction = async <T>(
  deps: Deps,
  useCase: (work: Work) => Promise<T>,
): Promise<T> => {
  const events: DomainEvent[] = [];
  const answer = await deps.orm.em.fork().transactional((em) =>
    useCase({
      em: em,
      nowMs: deps.clock.now(),
      tell: (event) => events.push(event),
    }),
  );
  deps.bus.emit(events);
  return answer;
};

/** An entity manager for reading. */
export const reader = (deps: Deps): EntityManager => deps.orm.em.fork();
