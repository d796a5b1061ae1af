import type { EntityManager } from '@mikro-orm/sqlite';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import { inTransaction, reader, type Deps, type Work } from '../../deps.ts';
import { conflict, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { confirmPlan } from './confirm.ts';
import { standingContacts } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { mailLeads, mailOperators } from './plan-mails.ts';
import { asAsked, cutOffMs, lastRound, signOffsOf } from './plan-read.service.ts';
import { beginStep, closeRound, moveTo, reread, type LifeWish } from './plan-steps.ts';
import type { SignOffRow } from './sign-off.entity.ts';
import type { World, Worlds } from './world.ts';

const missingMissions = async (em: EntityManager, plan: DayPlan): Promise<SignOffRow[]> => {
  const round = await lastRound(em, plan.id);
  return round ? (await signOffsOf(em, round)).filter((one) => one.state === 'pending') : [];
};

/** Before the cut-off every signature is needed; after it the scheduler may go without, with a reason. */
const checkSignatures = async (
  deps: Deps,
  { plan, world, reason }: { plan: DayPlan; world: World; reason: string },
): Promise<void> => {
  const missing = await missingMissions(reader(deps), plan);
  if (missing.length === 0) return;
  const names = missing.map((one) => one.mission.name).join(', ');
  if (deps.clock.now() < cutOffMs(plan, world.station))
    throw conflict(
      'signatures-missing',
      `${names} have not signed, and the cut-off is not reached.`,
    );
  if (reason.length < 3)
    throw unprocessable('reason-needed', `Say why the plan goes out without ${names}.`, [
      { pointer: '/reasonForMissingSignatures', detail: 'A reason is needed' },
    ]);
};

/** approved (or in review after the cut-off) -> released; the revision before it is superseded. */
export const releasePlan = async (
  deps: Deps,
  worlds: Worlds,
  wish: LifeWish & { reason: string },
): Promise<DayPlan> => {
  const seen = await beginStep(deps, wish, 'plan.release');
  const base = await worlds.of(seen);
  await checkSignatures(deps, { plan: seen, world: base, reason: wish.reason });
  const round = await lastRound(reader(deps), seen.id);
  const world = { ...base, day: asAsked(base.day, round) };
  const contacts = await standingContacts(reader(deps), seen.id);
  await confirmPlan(deps, world, contacts);
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    await closeRound(work, plan, 'released');
    plan.missingSignaturesReason = wish.reason || null;
    await putInForce(work, plan, world);
    await audit(work, wish.person, {
      action: 'plan.release',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}, revision ${plan.revision}, released`,
      details: { contacts: contacts.length, withoutSignatures: wish.reason || null },
    });
    await mailRelease(work, plan, contacts);
    return plan;
  });
};

/** Supersedes the revision in force and keeps the names as they are now. */
export const putInForce = async (work: Work, plan: DayPlan, world: World): Promise<void> => {
  const before = await work.em.find(DayPlan, {
    station: plan.station.id,
    day: plan.day,
    state: 'released',
  });
  for (const old of before) if (old.id !== plan.id) moveTo(work, old, 'superseded');
  moveTo(work, plan, 'released');
  plan.releasedMs = work.nowMs;
  plan.releasedNames = Object.fromEntries(
    [...world.day.satellites, ...world.day.missions].map((one) => [one.id, one.name]),
  );
  await work.em.flush();
};

const mailRelease = async (
  work: Work,
  plan: DayPlan,
  contacts: readonly ContactModel[],
): Promise<void> => {
  const event = `release ${plan.id} ${plan.contentVersion}`;
  await mailLeads(work, [...new Set(contacts.map((one) => one.missionId))], (missionName) => ({
    event,
    subject: `${missionName}: the plan of ${plan.day} is released`,
    lines: [`Revision ${plan.revision} of the plan of ${plan.day} is in force.`],
  }));
  await mailOperators(work, {
    event,
    subject: `The plan of ${plan.day} is released`,
    lines: [`Revision ${plan.revision} with ${contacts.length} contacts is in force.`],
  });
};
