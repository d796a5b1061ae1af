import { IdParams } from '../../../shared/schemas/common.ts';
import { ContactLog, ContactLogList, PutContactLog } from '../../../shared/schemas/contact-log.ts';
import {
  AssignBody,
  ChangeBody,
  EditPlan,
  EditQuery,
  EditResult,
  OperationalChange,
  type Edit,
} from '../../../shared/schemas/edit.ts';
import { Plan } from '../../../shared/schemas/plan.ts';
import { CreateAssignmentRun, RunStarted } from '../../../shared/schemas/run.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import type { Jobs } from '../../jobs/jobs.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import { getContactLog, logsOfPlan, putContactLog } from './contact-log.service.ts';
import { editPlan } from './plan-edits.service.ts';
import { operate } from './plan-operations.service.ts';
import { presentContact, presentViolation } from './plan.presenter.ts';
import { planOfContact, viewPlan } from './plan-read.service.ts';
import { planAnswer } from './plan.routes.ts';
import { startAssignment } from './plan-runs.service.ts';
import type { Worlds } from './world.ts';

interface Kit {
  deps: Deps;
  worlds: Worlds;
  jobs: Jobs;
}
interface EditCall {
  person: Person;
  planId: string;
  edits: Edit[];
  ifMatch: string;
  dryRun?: boolean;
}

const edit = async ({ deps, worlds }: Kit, call: EditCall): Promise<Answer> => {
  const { person, planId, edits, ifMatch, dryRun = false } = call;
  const done = await editPlan(deps, worlds, { person, wish: { planId, edits, ifMatch, dryRun } });
  const view = await viewPlan(deps, worlds, planId);
  const body: EditResult = {
    version: done.plan.contentVersion,
    contacts: dryRun
      ? []
      : view.rows
          .filter((row) => done.edited.touched.has(row.contact.id))
          .map((row) => presentContact(view.world, row, person)),
    removedIds: done.removedIds,
    inverse: done.edited.inverse,
    violations: done.violations.map(presentViolation),
  };
  return { body, etag: tagOf(planId, done.plan.contentVersion) };
};

const editRoutes = (kit: Kit) => [
  route({
    method: 'post',
    path: '/plans/:id/edits',
    summary: 'Edit contacts, all or none; dryRun=true only judges',
    access: 'session',
    action: 'plan.edit',
    params: IdParams,
    query: EditQuery,
    body: EditPlan,
    answer: EditResult,
    // A dry run changes nothing, so it needs no tag.
    tagged: (request) => request.query['dryRun'] !== 'true',
    handler: ({ person, params, query, body, ifMatch }) =>
      edit(kit, {
        person,
        planId: params.id,
        edits: body.edits,
        ifMatch,
        dryRun: query.dryRun === 'true',
      }),
  }),
  route({
    method: 'post',
    path: '/plans/:id/contacts',
    summary: 'Assign one pass',
    access: 'session',
    action: 'plan.edit',
    params: IdParams,
    body: AssignBody,
    answer: EditResult,
    status: 201,
    tagged: true,
    handler: ({ person, params, body, ifMatch }) =>
      edit(kit, { person, planId: params.id, edits: [{ op: 'assign', ...body }], ifMatch }),
  }),
  route({
    method: 'patch',
    path: '/contacts/:id',
    summary: 'Change one contact on the plan in hand',
    access: 'session',
    action: 'plan.edit',
    params: IdParams,
    body: ChangeBody,
    answer: EditResult,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      const plan = await planOfContact(reader(kit.deps), person, params.id);
      const edits: Edit[] = [{ op: 'change', contactId: params.id, ...body }];
      return edit(kit, { person, planId: plan.id, edits, ifMatch });
    },
  }),
  route({
    method: 'delete',
    path: '/contacts/:id',
    summary: 'Take one contact off the plan in hand',
    access: 'session',
    action: 'plan.edit',
    params: IdParams,
    answer: EditResult,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      const plan = await planOfContact(reader(kit.deps), person, params.id);
      const edits: Edit[] = [{ op: 'remove', contactId: params.id }];
      return edit(kit, { person, planId: plan.id, edits, ifMatch });
    },
  }),
];

const workRoutes = ({ deps, worlds, jobs }: Kit) => [
  route({
    method: 'post',
    path: '/plans/:id/assignment-runs',
    summary: 'Assign the open passes; the result is put on the plan if nobody changed it meanwhile',
    access: 'session',
    action: 'plan.assign',
    params: IdParams,
    body: CreateAssignmentRun,
    answer: RunStarted,
    status: 202,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => ({
      body: {
        runId: await startAssignment(
          deps,
          { worlds, jobs },
          { person, planId: params.id, wish: body, ifMatch },
        ),
      },
    }),
  }),
  route({
    method: 'post',
    path: '/plans/:id/operational-changes',
    summary: 'Repair the running day: a new revision, released at once',
    access: 'session',
    action: 'plan.operate',
    params: IdParams,
    body: OperationalChange,
    answer: Plan,
    status: 201,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) => {
      const wish = { person, planId: params.id, change: body, ifMatch };
      const { plan } = await operate(deps, worlds, wish);
      return planAnswer(deps, worlds, { id: plan.id, person });
    },
  }),
];

const logRoutes = ({ deps }: Kit) => [
  route({
    method: 'put',
    path: '/contacts/:id/log',
    summary: 'How the contact went',
    access: 'session',
    action: 'log.contacts',
    params: IdParams,
    body: PutContactLog,
    answer: ContactLog,
    handler: async ({ person, params, body }) => ({
      body: await putContactLog(deps, person, { contactId: params.id, log: body }),
    }),
  }),
  route({
    method: 'get',
    path: '/contacts/:id/log',
    summary: 'The log of one contact',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: ContactLog,
    handler: async ({ person, params }) => ({
      body: await getContactLog(reader(deps), person, params.id),
    }),
  }),
  route({
    method: 'get',
    path: '/plans/:id/logs',
    summary: 'The logs of a plan’s contacts',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: ContactLogList,
    handler: async ({ person, params }) => ({
      body: { items: await logsOfPlan(reader(deps), person, params.id) },
    }),
  }),
];

export const planWorkRoutes = (kit: Kit) => [
  ...editRoutes(kit),
  ...workRoutes(kit),
  ...logRoutes(kit),
];
