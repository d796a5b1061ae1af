import type { EntityManager } from '@mikro-orm/sqlite';
import { toIso } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import { audit } from '../audit/audit.service.ts';
import { Prediction } from '../passes/pass.entity.ts';
import { standingContacts, storeContacts, type WishedContact } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { unreleasedPlan } from './plan-create.service.ts';
import { mailLeads, mailOperators } from './plan-mails.ts';
import { getPlan } from './plan-read.service.ts';
import { putInForce } from './plan-release.service.ts';
import { copyRevision } from './plan-revise.service.ts';
import { retimeContacts, type Retimed, type RetimeOutcome } from './retime.ts';
import type { World, Worlds } from './world.ts';

/** Who acts when nobody does. */
const SYSTEM: Person = {
  id: '00000000-0000-4000-8000-000000000000',
  name: 'Skysheaf',
  email: '',
  roles: [],
  leadsMissionIds: [],
  sessionId: null,
};

const plannedTca = async (
  em: EntityManager,
  contacts: readonly WishedContact[],
): Promise<Map<string, number>> => {
  const predictions = await em.find(Prediction, {
    id: { $in: contacts.map((contact) => contact.predictionId) },
  });
  return new Map(predictions.map((one) => [one.id, one.tcaMs]));
};

/**
 * After fresh predictions: drafts are re-timed in place with what changed on the audit trail; released plans by an
 * operational revision without sign-off; a plan in review or approved is left as it was read and marked.
 */
export const retimePlans = async (deps: Deps, worlds: Worlds, fromDay: string): Promise<void> => {
  const plans = await reader(deps).find(
    DayPlan,
    { day: { $gte: fromDay }, state: { $in: ['draft', 'released'] } },
    { orderBy: { day: 'asc' } },
  );
  for (const plan of plans) await retimePlan(deps, worlds, plan);
};

const retimePlan = async (deps: Deps, worlds: Worlds, seen: DayPlan): Promise<void> => {
  const em = reader(deps);
  const world = await worlds.of(seen);
  const contacts = await standingContacts(em, seen.id);
  const outcome = retimeContacts({
    world,
    contacts,
    plannedTcaMs: await plannedTca(em, contacts),
    nowMs: deps.clock.now(),
  });
  if (outcome.retimed.length === 0) return;
  await inTransaction(deps, async (work) => {
    const plan = await getPlan(work.em, seen.id);
    // Somebody changed it meanwhile: their change sends an event of its own, and the next run looks again.
    if (plan.contentVersion !== seen.contentVersion || plan.state !== seen.state) return;
    const changed = plan.state === 'released' ? await revised(work, plan, world) : plan;
    await storeContacts(work, changed, { world, wished: outcome.contacts });
    if (changed !== plan) await putInForce(work, changed, world);
    await tell(work, { plan: changed, world, outcome });
  });
};

const revised = async (work: Work, plan: DayPlan, world: World): Promise<DayPlan> => {
  const revision = await copyRevision(work, plan, { person: SYSTEM, state: 'approved' });
  revision.createdById = null;
  revision.operational = {
    kind: 'retime',
    reason: 'Fresh element sets',
    caller: '',
    byName: SYSTEM.name,
    atMs: work.nowMs,
  };
  const open = await unreleasedPlan(work.em, world.station.id, plan.day);
  if (open && open.id !== revision.id)
    open.needsAttention = `Operational revision ${revision.revision} was released meanwhile.`;
  await work.em.flush();
  return revision;
};

const sentence = (world: World, one: Retimed): string => {
  const name = world.context.satellites.get(one.satelliteId)?.name ?? 'A satellite';
  const sign = one.shiftSeconds > 0 ? '+' : '−';
  return `${name}: ${sign}${Math.abs(one.shiftSeconds)} s, now ${toIso(one.after.fromMs).slice(11, 19)} to ${toIso(one.after.toMs).slice(11, 19)} UTC`;
};

const tell = async (
  work: Work,
  { plan, world, outcome }: { plan: DayPlan; world: World; outcome: RetimeOutcome },
): Promise<void> => {
  await audit(work, null, {
    action: 'plan.retime',
    entity: 'plan',
    entityId: plan.id,
    summary: `Plan of ${plan.day}: ${outcome.retimed.length} contacts follow fresh element sets`,
    details: { retimed: outcome.retimed, drifted: outcome.drifted },
  });
  if (plan.state !== 'released') return;
  const missions = [...new Set(outcome.retimed.map((one) => one.missionId))];
  for (const missionId of missions)
    await mailLeads(work, [missionId], (missionName) => ({
      event: `retime ${plan.id}`,
      subject: `${missionName}: contacts of ${plan.day} follow fresh element sets`,
      lines: outcome.retimed
        .filter((one) => one.missionId === missionId)
        .map((one) => sentence(world, one)),
    }));
  await mailOperators(work, {
    event: `retime ${plan.id}`,
    subject: `Contacts of ${plan.day} follow fresh element sets`,
    lines: outcome.retimed.map((one) => sentence(world, one)),
  });
};
