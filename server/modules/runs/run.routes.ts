import { mayEver } from '../../../shared/policy.ts';
import { IdParams } from '../../../shared/schemas/common.ts';
import { Run } from '../../../shared/schemas/run.ts';
import { toIso } from '../../../shared/time.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import { forbidden, notFound } from '../../errors.ts';
import type { Jobs } from '../../jobs/jobs.ts';
import { route } from '../../middleware/route.ts';
import { RunRow } from './run.entity.ts';

const present = (run: RunRow): Run => ({
  id: run.id,
  kind: run.kind,
  state: run.state,
  progress: run.progress,
  step: run.step,
  planId: run.planId ?? null,
  startedBy: run.startedByName,
  createdUtc: toIso(run.createdMs),
  finishedUtc: run.finishedMs == null ? null : toIso(run.finishedMs),
  result: run.result ?? null,
  error: run.error ?? null,
});

/** A lead sees only the runs that he or she started. */
const getRun = async (deps: Deps, person: Person, id: string): Promise<RunRow> => {
  const run = await reader(deps).findOne(RunRow, id);
  const isOwn = run?.startedById === person.id;
  if (!run || (!isOwn && !mayEver(person, 'see.everything'))) throw notFound('The run');
  return run;
};

const RIGHT = { prediction: 'run.predictions', assignment: 'plan.assign' } as const;

export const runRoutes = (
  deps: Deps,
  jobs: Jobs,
  apply: (person: Person, run: RunRow) => Promise<void>,
) => [
  route({
    method: 'get',
    path: '/runs/:id',
    summary: 'Background work: state, progress, result',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: Run,
    handler: async ({ person, params }) => ({
      body: present(await getRun(deps, person, params.id)),
    }),
  }),
  route({
    method: 'post',
    path: '/runs/:id/cancel',
    summary: 'Stop it; an assignment keeps the best plan found so far',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: Run,
    status: 202,
    handler: async ({ person, params }) => {
      const run = await getRun(deps, person, params.id);
      if (run.startedById !== person.id && !mayEver(person, RIGHT[run.kind]))
        throw forbidden('Your role does not allow this.');
      await jobs.cancel(run.id);
      return { body: present(await getRun(deps, person, params.id)) };
    },
  }),
  route({
    method: 'post',
    path: '/runs/:id/apply',
    summary: 'Put the plan that an assignment found onto the day plan',
    access: 'session',
    action: 'plan.assign',
    params: IdParams,
    answer: Run,
    handler: async ({ person, params }) => {
      await apply(person, await getRun(deps, person, params.id));
      return { body: present(await getRun(deps, person, params.id)) };
    },
  }),
];
