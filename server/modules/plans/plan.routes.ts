import { IdParams } from '../../../shared/schemas/common.ts';
import {
  ChangesQuery,
  CreatePlan,
  PatchPlan,
  Plan,
  PlanChanges,
  PlanFacts,
  PlanPage,
  PlanQuery,
  ReleasePlan,
  Sign,
  WithdrawPlan,
} from '../../../shared/schemas/plan.ts';
import { z } from 'zod';
import { reader, type Deps, type Person } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import { getStation } from '../stations/station.service.ts';
import { planChanges } from './plan-changes.ts';
import { createPlan, setLimitOfDay } from './plan-create.service.ts';
import { presentFacts } from './plan-facts.ts';
import { releasePlan } from './plan-release.service.ts';
import { revisePlan } from './plan-revise.service.ts';
import { signPlan } from './plan-sign.service.ts';
import { submitPlan, withdrawPlan } from './plan-submit.service.ts';
import { presentPlan, presentSummary } from './plan.presenter.ts';
import { lastRound, listPlans, signOffsOf, viewPlan } from './plan-read.service.ts';
import type { Worlds } from './world.ts';

/** The whole plan as the person may see it, with the tag that every reader sees. */
export const planAnswer = async (
  deps: Deps,
  worlds: Worlds,
  { id, person }: { id: string; person: Person },
): Promise<Answer> => {
  const view = await viewPlan(deps, worlds, id);
  return {
    body: presentPlan(view, person, deps.clock.now()),
    etag: tagOf(view.plan.id, view.plan.contentVersion),
  };
};

const readRoutes = (deps: Deps, worlds: Worlds) => [
  route({
    method: 'get',
    path: '/plans',
    summary: 'Day plans, by day',
    access: 'session',
    action: 'see.plan-side',
    query: PlanQuery,
    answer: PlanPage,
    handler: async ({ query, person }) => {
      const em = reader(deps);
      const found = await listPlans(em, query);
      const nowMs = deps.clock.now();
      const items = [];
      for (const plan of found.items) {
        const round = await lastRound(em, plan.id);
        items.push(
          presentSummary({
            plan,
            station: await getStation(em, plan.station.id),
            signOffs: round ? await signOffsOf(em, round) : [],
            person,
            nowMs,
          }),
        );
      }
      return { body: { items, nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/plans/:id',
    summary: 'One plan with contacts, sign-offs, results and what the reader may do',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: Plan,
    handler: ({ params, person }) => planAnswer(deps, worlds, { id: params.id, person }),
  }),
  route({
    method: 'get',
    path: '/plans/:id/facts',
    summary: 'Windows, conflicts, busy intervals and closures of the day',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: PlanFacts,
    handler: async ({ params, person }) => ({
      body: presentFacts(await viewPlan(deps, worlds, params.id), person),
    }),
  }),
  route({
    method: 'get',
    path: '/plans/:id/changes',
    summary: 'What differs from another revision of the day',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    query: ChangesQuery,
    answer: PlanChanges,
    handler: async ({ params, query, person }) => ({
      body: await planChanges(reader(deps), {
        view: await viewPlan(deps, worlds, params.id),
        against: query.against,
        person,
      }),
    }),
  }),
];

const lifeRoutes = (deps: Deps, worlds: Worlds) => [
  route({
    method: 'post',
    path: '/plans',
    summary: 'Begin the plan of a day',
    access: 'session',
    action: 'create.plans',
    body: CreatePlan,
    answer: Plan,
    status: 201,
    handler: async ({ person, body }) => {
      const plan = await createPlan(deps, worlds, { person, wish: body });
      return planAnswer(deps, worlds, { id: plan.id, person });
    },
  }),
  route({
    method: 'patch',
    path: '/plans/:id',
    summary: 'Set the limit of the day',
    access: 'session',
    action: 'plan.set-limit',
    params: IdParams,
    body: PatchPlan,
    answer: Plan,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      await setLimitOfDay(deps, worlds, {
        person,
        planId: params.id,
        limitOfDayDb: body.limitOfDayDb,
        ifMatch,
      });
      return planAnswer(deps, worlds, { id: params.id, person });
    },
  }),
  route({
    method: 'post',
    path: '/plans/:id/submit',
    summary: 'Submit for sign-off; every hard rule is judged again',
    access: 'session',
    action: 'plan.submit',
    params: IdParams,
    body: z.strictObject({}),
    answer: Plan,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await submitPlan(deps, worlds, { person, planId: params.id, ifMatch });
      return planAnswer(deps, worlds, { id: params.id, person });
    },
  }),
  route({
    method: 'post',
    path: '/plans/:id/withdraw',
    summary: 'Take a plan back from review or approval',
    access: 'session',
    action: 'plan.withdraw',
    params: IdParams,
    body: WithdrawPlan,
    answer: Plan,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      const reason = body.reason ?? '';
      await withdrawPlan(deps, { person, planId: params.id, ifMatch, reason });
      return planAnswer(deps, worlds, { id: params.id, person });
    },
  }),
  route({
    method: 'post',
    path: '/plans/:id/sign-offs',
    summary: 'Approve or return, for one mission',
    access: 'session',
    action: 'plan.sign',
    params: IdParams,
    body: Sign,
    answer: Plan,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      await signPlan(deps, { person, planId: params.id, ifMatch, ...body });
      return planAnswer(deps, worlds, { id: params.id, person });
    },
  }),
  route({
    method: 'post',
    path: '/plans/:id/release',
    summary: 'Release; every hard rule is judged again',
    access: 'session',
    action: 'plan.release',
    params: IdParams,
    body: ReleasePlan,
    answer: Plan,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      const reason = body.reasonForMissingSignatures ?? '';
      await releasePlan(deps, worlds, { person, planId: params.id, ifMatch, reason });
      return planAnswer(deps, worlds, { id: params.id, person });
    },
  }),
  route({
    method: 'post',
    path: '/plans/:id/revise',
    summary: 'Begin a new revision of a released plan',
    access: 'session',
    action: 'plan.revise',
    params: IdParams,
    body: z.strictObject({}),
    answer: Plan,
    status: 201,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      const plan = await revisePlan(deps, { person, planId: params.id, ifMatch });
      return planAnswer(deps, worlds, { id: plan.id, person });
    },
  }),
];

export const planRoutes = (deps: Deps, worlds: Worlds) => [
  ...readRoutes(deps, worlds),
  ...lifeRoutes(deps, worlds),
];
