import { IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import { OpenPassPage } from '../../../shared/schemas/plan.ts';
import type { Deps } from '../../deps.ts';
import { badRequest } from '../../errors.ts';
import { route } from '../../middleware/route.ts';
import { openPassesOf } from './open-passes.ts';
import { viewPlan } from './plan-read.service.ts';
import type { Worlds } from './world.ts';

export const openPassRoutes = (deps: Deps, worlds: Worlds) => [
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
      const all = openPassesOf(await viewPlan(deps, worlds, params.id), person);
      const from = query.cursor ? Number(query.cursor) : 0;
      if (!Number.isInteger(from) || from < 0)
        throw badRequest('The cursor is not one that this list gave out.');
      const items = all.slice(from, from + query.limit);
      const end = from + items.length;
      return { body: { items, nextCursor: end < all.length ? String(end) : null } };
    },
  }),
];
