import { IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import { NextContactQuery, NextContacts } from '../../../shared/schemas/edit.ts';
import { OpenPassPage } from '../../../shared/schemas/plan.ts';
import type { Deps } from '../../deps.ts';
import { badRequest } from '../../errors.ts';
import { route } from '../../middleware/route.ts';
import { nextContactsOf } from './next-contacts.service.ts';
import { OpenPasses } from './open-passes.ts';
import { viewPlan } from './plan-read.service.ts';
import type { Worlds } from './world.ts';

export const openPassRoutes = (deps: Deps, worlds: Worlds) => {
  const openPasses = new OpenPasses(deps);
  return [
    route({
      method: 'get',
      path: '/plans/:id/open-passes',
      summary: 'Passes that are not on the plan, why, and what would free them',
      access: 'session',
      action: 'see.plan-side',
      params: IdParams,
      query: PageQuery.extend({ limit: PageQuery.shape.limit.default(500) }),
      answer: OpenPassPage,
      handler: async ({ params, query, person }) => {
        const all = await openPasses.of(await viewPlan(deps, worlds, params.id), person);
        const from = query.cursor ? Number(query.cursor) : 0;
        if (!Number.isInteger(from) || from < 0)
          throw badRequest('The cursor is not one that this list gave out.');
        const items = all.slice(from, from + query.limit);
        const end = from + items.length;
        return { body: { items, nextCursor: end < all.length ? String(end) : null } };
      },
    }),
    route({
      method: 'get',
      path: '/satellites/:id/next-contacts',
      summary: 'The next windows of a satellite on all faces, with what each would displace',
      access: 'session',
      action: 'plan.operate',
      params: IdParams,
      query: NextContactQuery,
      answer: NextContacts,
      handler: async ({ params, query, person }) => ({
        body: {
          items: await nextContactsOf(deps, worlds, {
            person,
            satelliteId: params.id,
            stationId: query.stationId,
            needsUplink: query.uplink === 'true',
          }),
        },
      }),
    }),
  ];
};
