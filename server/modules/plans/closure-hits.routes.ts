import { ClosureHits } from '../../../shared/schemas/channel.ts';
import { IdParams } from '../../../shared/schemas/common.ts';
import { dayOf } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import { route } from '../../middleware/route.ts';
import { visibleTo } from '../../visible-to.ts';
import { getClosure } from '../stations/closure.service.ts';
import { closureHits } from './closure-hits.ts';
import { standingContacts } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import type { Worlds } from './world.ts';

export const closureHitRoutes = (deps: Deps, worlds: Worlds) => [
  route({
    method: 'get',
    path: '/closures/:id/hits',
    summary: 'Contacts of today and later that a closure hits, each with a proposal',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: ClosureHits,
    handler: async ({ params, person }) => {
      const em = reader(deps);
      const closure = await getClosure(em, params.id);
      const plans = await em.find(
        DayPlan,
        {
          station: closure.station.id,
          day: { $gte: dayOf(deps.clock.now()) },
          state: { $ne: 'superseded' },
        },
        { orderBy: { day: 'asc' } },
      );
      const items = [];
      for (const plan of plans) {
        const contacts = await standingContacts(em, plan.id);
        const world = await worlds.of(plan);
        items.push(...closureHits(world, { contacts, closureId: closure.id, planId: plan.id }));
      }
      const visible = visibleTo(person);
      return { body: { items: items.filter((one) => visible.mission(one.missionId)) } };
    },
  }),
];
