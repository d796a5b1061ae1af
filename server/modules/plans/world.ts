import type { EntityManager } from '@mikro-orm/sqlite';
import { planContext, type PlanContext } from '../../../shared/schedule/context.ts';
import type { DayModel, Facts } from '../../../shared/schedule/model.ts';
import { reader, type Deps } from '../../deps.ts';
import { Station } from '../stations/station.entity.ts';
import { loadDay, neighbourContacts, neighbourPlans, type Source } from './day-model.ts';
import type { DayPlan } from './plan.entity.ts';

/** Everything that a day's plan is judged by. */
export interface World {
  station: Station;
  day: DayModel;
  facts: Facts;
  context: PlanContext;
  sources: Map<string, Source>;
}

type DayOfStation = Pick<DayPlan, 'day' | 'limitOfDayDb'> & { station: { id: string } };

/** A pass list over the whole prediction span touches twelve days. */
const KEPT = 16;

/**
 * The world of a day, kept until something changes that it depends on: passes, fleet, station, closures (told by
 * events) or a neighbouring day's plan (in the key). Facts are computed in a worker thread.
 */
export class Worlds {
  readonly #deps: Deps;
  readonly #kept = new Map<string, Promise<World>>();
  #revision = 0;

  constructor(deps: Deps) {
    this.#deps = deps;
    deps.bus.subscribe((event) => {
      if (['passes', 'fleet', 'station', 'closure'].includes(event.topic)) this.#revision += 1;
    });
  }

  async of(plan: DayOfStation): Promise<World> {
    const em = reader(this.#deps);
    const neighbours = await neighbourPlans(em, plan.station.id, plan.day);
    const key = [
      this.#revision,
      plan.station.id,
      plan.day,
      plan.limitOfDayDb,
      ...neighbours.map((one) => `${one.id}-${one.contentVersion}`),
    ].join(' ');
    const kept = this.#kept.get(key);
    if (kept) return kept;
    const made = this.#make(em, plan, await neighbourContacts(em, neighbours));
    this.#kept.set(key, made);
    made.catch(() => this.#kept.delete(key));
    for (const old of [...this.#kept.keys()].slice(0, -KEPT)) this.#kept.delete(old);
    return made;
  }

  async #make(
    em: EntityManager,
    plan: DayOfStation,
    neighbours: DayModel['neighbours'],
  ): Promise<World> {
    const station = await em.findOneOrFail(Station, plan.station.id);
    const { day, sources } = await loadDay(em, {
      station,
      day: plan.day,
      limitOfDayDb: plan.limitOfDayDb,
      neighbours,
    });
    const facts = await this.#deps.pool.run('computeFacts', day);
    return { station, day, facts, context: planContext(day, facts), sources };
  }
}
