import type { Response } from 'express';
import { z } from 'zod';
import { IdParams } from '../../../shared/schemas/common.ts';
import type { Deps } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { viewPlan } from '../plans/plan-read.service.ts';
import type { Worlds } from '../plans/world.ts';
import {
  contactsCsv,
  exportName,
  LONGEST_STEP_S,
  planCalendar,
  pointingCsv,
  SHORTEST_STEP_S,
} from './export.service.ts';

const send = (
  response: Response,
  { type, name, body }: { type: string; name: string; body: string },
): Answer => {
  response.setHeader('Content-Type', `${type}; charset=utf-8`);
  response.setHeader('Content-Disposition', `attachment; filename="${name}"`);
  response.send(body);
  return { sent: true };
};

export const exportRoutes = (deps: Deps, worlds: Worlds) => [
  route({
    method: 'get',
    path: '/plans/:id/contacts.csv',
    summary: 'Contacts of a plan, one row each (RFC 4180)',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    handler: async ({ params, person, response }) => {
      const view = await viewPlan(deps, worlds, params.id);
      const body = await contactsCsv(deps, view, person);
      return send(response, { type: 'text/csv', name: exportName(view, 'contacts', 'csv'), body });
    },
  }),
  route({
    method: 'get',
    path: '/plans/:id/pointing.csv',
    summary: 'Pointing along each contact, from the element sets in use now (RFC 4180)',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    query: z.strictObject({
      stepSeconds: z.coerce.number().int().min(SHORTEST_STEP_S).max(LONGEST_STEP_S).default(10),
    }),
    handler: async ({ params, query, person, response }) => {
      const view = await viewPlan(deps, worlds, params.id);
      const body = await pointingCsv(deps, { view, person, stepSeconds: query.stepSeconds });
      return send(response, { type: 'text/csv', name: exportName(view, 'pointing', 'csv'), body });
    },
  }),
  route({
    method: 'get',
    path: '/plans/:id/calendar.ics',
    summary: 'Contacts of a plan as a calendar (RFC 5545)',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    handler: async ({ params, person, response }) => {
      const view = await viewPlan(deps, worlds, params.id);
      const body = await planCalendar(deps, view, person);
      return send(response, {
        type: 'text/calendar',
        name: exportName(view, 'contacts', 'ics'),
        body,
      });
    },
  }),
];
