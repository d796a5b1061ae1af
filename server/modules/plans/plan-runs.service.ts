import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { mayEver } from '../../../shared/policy.ts';
import type { DayModel, Facts } from '../../../shared/schedule/model.ts';
import type { CreateAssignmentRun } from '../../../shared/schemas/run.ts';
import { SECOND_MS } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person } from '../../deps.ts';
import { AppError, conflict, forbidden, notFound } from '../../errors.ts';
import type { JobContext, JobOutcome, Jobs } from '../../jobs/jobs.ts';
import { solveDay, type SolvedContact } from '../../solver/solve-day.ts';
import { audit } from '../audit/audit.service.ts';
import { RunRow } from '../runs/run.entity.ts';
import { confirmPlan } from './confirm.ts';
import { standingContacts, storeContacts, type WishedContact } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { requireAction, requireTag } from './plan-steps.ts';
import { getPlan } from './plan-read.service.ts';
import type { World, Worlds } from './world.ts';

const Leg = z.object({ channelId: z.string(), fromMs: z.number(), toMs: z.number() });
/** What a run proposes, as it is kept with the run. */
const Proposal = z.object({
  contacts: z.array(
    z.object({
      id: z.string(),
      passId: z.string(),
      predictionId: z.string(),
      satelliteId: z.string(),
      missionId: z.string(),
      faceId: z.string(),
      receive: Leg,
      transmit: Leg.nullable(),
      locked: z.boolean(),
      note: z.string(),
      emergency: z.boolean(),
    }),
  ),
});
type Proposal = z.infer<typeof Proposal>;

interface AssignWish {
  person: Person;
  planId: string;
  wish: CreateAssignmentRun;
  ifMatch: string;
}

/** Starts an assignment; one at a time for each plan. */
export const startAssignment = async (
  deps: Deps,
  { worlds, jobs }: { worlds: Worlds; jobs: Jobs },
  { person, planId, wish, ifMatch }: AssignWish,
): Promise<string> => {
  const plan = await getPlan(reader(deps), planId);
  if (!mayEver(person, 'plan.assign')) throw forbidden('Your role does not allow this.');
  requireTag(plan, ifMatch);
  requireAction(person, 'plan.assign', plan);
  const running = await reader(deps).findOne(RunRow, {
    planId,
    kind: 'assignment',
    state: { $in: ['queued', 'running'] },
  });
  if (running)
    throw conflict('run-in-progress', 'An assignment of this plan is running.', {
      runId: running.id,
    });
  // Repair before re-plan: once a revision of the day has been in review, few changes matter more than minutes.
  const mode = plan.hasBeenReviewed ? 'repair' : wish.mode;
  return jobs.start(
    {
      kind: 'assignment',
      person,
      planId,
      planVersion: plan.contentVersion,
      input: { mode, timeLimitSeconds: wish.timeLimitSeconds },
    },
    (context) => assign(deps, worlds, { person, planId, mode, wish }, context),
  );
};

interface AssignTask {
  person: Person;
  planId: string;
  mode: CreateAssignmentRun['mode'];
  wish: CreateAssignmentRun;
}

/** What lies before the freeze time is fixed: its contacts are occupancy, its windows are gone. */
const fromFreezeOn = (world: World, contacts: WishedContact[], nowMs: number) => {
  const plannableMs =
    Math.ceil((nowMs + world.day.station.freezeTimeSeconds * SECOND_MS) / SECOND_MS) * SECOND_MS;
  const fixed = contacts.filter((contact) => contact.receive.fromMs < plannableMs);
  const open = contacts.filter((contact) => contact.receive.fromMs >= plannableMs);
  const day: DayModel = { ...world.day, neighbours: [...world.day.neighbours, ...fixed] };
  const facts: Facts = {
    ...world.facts,
    windows: world.facts.windows.flatMap((window) =>
      window.toMs <= plannableMs
        ? []
        : [{ ...window, fromMs: Math.max(window.fromMs, plannableMs) }],
    ),
  };
  return { day, facts, fixed, open };
};

const assign = async (
  deps: Deps,
  worlds: Worlds,
  { person, planId, mode, wish }: AssignTask,
  context: JobContext,
): Promise<JobOutcome> => {
  const em = reader(deps);
  const plan = await getPlan(em, planId);
  const readVersion = plan.contentVersion;
  const world = await worlds.of(plan);
  const contacts = await standingContacts(em, planId);
  const { day, facts, fixed, open } = fromFreezeOn(world, contacts, deps.clock.now());
  const solved = await solveDay(
    { day, facts, current: open, mode, timeLimitSeconds: wish.timeLimitSeconds },
    { signal: context.signal, onProgress: context.progress },
  );
  const wished = [...fixed, ...solved.contacts.map((one) => wishedOf(one, open))];
  await confirmPlan(deps, world, wished, new Set(fixed.map((one) => one.id)));
  const result = {
    objective: solved.objective,
    bound: solved.bound,
    gap: solved.gap,
    assigned: wished.length,
    open: world.day.passes.length - new Set(wished.map((one) => one.passId)).size,
    words: solved.words,
    provenance: solved.provenance,
    seconds: solved.seconds,
    columns: solved.columns,
    changes: solved.changes,
    mode,
  };
  const cancelled = solved.provenance === 'cancelled';
  const applied =
    !cancelled && (await tryApply(deps, { person, planId, readVersion, world, wished, result }));
  return { result: { ...result, applied }, proposal: { contacts: wished }, cancelled };
};

/** A kept contact keeps identity and note; a new one gets an identity here. */
const wishedOf = (solved: SolvedContact, current: readonly WishedContact[]): WishedContact => {
  const before = current.find((contact) => contact.id === solved.id);
  const { id, ...rest } = solved;
  return {
    ...rest,
    id: id ?? randomUUID(),
    note: before?.note ?? '',
    emergency: before?.emergency ?? false,
  };
};

interface ApplyTask {
  person: Pick<Person, 'id' | 'name'>;
  planId: string;
  readVersion: number;
  world: World;
  wished: WishedContact[];
  result: { words: string; assigned: number; gap: number | null };
}

/** Applied as a difference, in one transaction, only on the version that the run read and only to a draft. */
const tryApply = (deps: Deps, task: ApplyTask): Promise<boolean> =>
  inTransaction(deps, async (work) => {
    const plan = await work.em.findOneOrFail(DayPlan, task.planId);
    if (plan.contentVersion !== task.readVersion || plan.state !== 'draft') return false;
    await storeContacts(work, plan, { world: task.world, wished: task.wished });
    await audit(work, task.person, {
      action: 'plan.assign',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}: ${task.result.assigned} contacts assigned, ${task.result.words}`,
      details: { gap: task.result.gap, version: plan.contentVersion },
    });
    return true;
  });

/** Tries again to put a run's proposal onto its plan: judged afresh, on the plan as it stands now. */
export const applyRun = async (
  deps: Deps,
  worlds: Worlds,
  { person, run }: { person: Person; run: RunRow },
): Promise<void> => {
  if (run.kind !== 'assignment' || !run.planId) throw notFound('The assignment');
  if (!run.proposal) throw conflict('no-proposal', 'The run has no plan to offer.');
  if (run.result?.applied === true) throw conflict('applied', 'It is on the plan already.');
  const proposal: Proposal = Proposal.parse(run.proposal);
  const plan = await getPlan(reader(deps), run.planId);
  requireAction(person, 'plan.assign', plan);
  if (plan.contentVersion !== run.planVersion)
    throw new AppError(
      412,
      'stale',
      'The plan was changed since the assignment read it. Assign again.',
    );
  const world = await worlds.of(plan);
  await confirmPlan(deps, world, proposal.contacts);
  const result = run.result as ApplyTask['result'];
  const applied = await tryApply(deps, {
    person,
    planId: plan.id,
    readVersion: plan.contentVersion,
    world,
    wished: proposal.contacts,
    result,
  });
  if (!applied) throw new AppError(412, 'stale', 'The plan was changed meanwhile. Assign again.');
  await reader(deps).nativeUpdate(
    RunRow,
    { id: run.id },
    { result: { ...run.result, applied: true } },
  );
};
