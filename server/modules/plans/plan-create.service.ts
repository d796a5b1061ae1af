import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { can, mayEver } from '../../../shared/policy.ts';
import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { CreatePlan } from '../../../shared/schemas/plan.ts';
import { inTransaction, reader, type Deps, type Person } from '../../deps.ts';
import { conflict, forbidden, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { Face } from '../stations/face.entity.ts';
import { getStation } from '../stations/station.service.ts';
import { standingContacts, storeContacts, tellPlan } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { requireAction, requireTag } from './plan-steps.ts';
import { getPlan, storedScore } from './plan-read.service.ts';
import type { Worlds } from './world.ts';

/** The next free revision number of a day. */
export const nextRevision = async (
  em: EntityManager,
  stationId: string,
  day: string,
): Promise<number> => {
  const plans = await em.find(DayPlan, { station: stationId, day });
  return Math.max(0, ...plans.map((plan) => plan.revision)) + 1;
};

export const unreleasedPlan = (em: EntityManager, stationId: string, day: string) =>
  em.findOne(DayPlan, {
    station: stationId,
    day,
    state: { $in: ['draft', 'in-review', 'approved'] },
  });

/** At most one unreleased revision a day; a released day is revised, not begun again. */
export const createPlan = async (
  deps: Deps,
  worlds: Worlds,
  { person, wish }: { person: Person; wish: CreatePlan },
): Promise<DayPlan> => {
  if (!can(person, 'create.plans')) throw forbidden('Your role does not allow this.');
  const em = reader(deps);
  const station = await getStation(em, wish.stationId);
  const faces = await em.find(Face, { station: station.id });
  if (faces.length === 0) throw conflict('no-face', `${station.name} has no array face yet.`);
  const limitOfDayDb = Math.max(...faces.map((face) => face.normalLimitDb));
  const world = await worlds.of({ station, day: wish.day, limitOfDayDb });
  return inTransaction(deps, async (work) => {
    const existing = await work.em.find(DayPlan, { station: station.id, day: wish.day });
    if (existing.length > 0)
      throw conflict('plan-exists', `${wish.day} has a plan already. Open or revise that one.`);
    const plan = work.em.create(DayPlan, {
      id: randomUUID(),
      station: station.id,
      day: wish.day,
      revision: 1,
      state: 'draft',
      limitOfDayDb,
      score: storedScore(world, []),
      createdMs: work.nowMs,
      updatedMs: work.nowMs,
      createdById: person.id,
    });
    await work.em.flush();
    await audit(work, person, {
      action: 'plan.create',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day} begun`,
    });
    tellPlan(work, plan);
    return plan;
  });
};

/** Another limit of the day; the contacts stay and are judged again at submit. */
export const setLimitOfDay = async (
  deps: Deps,
  worlds: Worlds,
  {
    person,
    planId,
    limitOfDayDb,
    ifMatch,
  }: { person: Person; planId: string; limitOfDayDb: number; ifMatch: string },
): Promise<DayPlan> => {
  const seen = await getPlan(reader(deps), planId);
  if (!mayEver(person, 'plan.set-limit')) throw forbidden('Your role does not allow this.');
  requireTag(seen, ifMatch);
  const faces = await reader(deps).find(Face, { station: seen.station.id });
  const hardEndDb = Math.max(...faces.map((face) => face.hardEndDb));
  if (limitOfDayDb > hardEndDb)
    throw unprocessable('beyond-hard-end', `No face can be used beyond ${hardEndDb} dB.`, [
      { pointer: '/limitOfDayDb', detail: `At most ${hardEndDb} dB` },
    ]);
  const world = await worlds.of({ station: seen.station, day: seen.day, limitOfDayDb });
  return inTransaction(deps, async (work) => {
    const plan = await getPlan(work.em, planId);
    requireTag(plan, ifMatch);
    requireAction(person, 'plan.set-limit', plan);
    const from = plan.limitOfDayDb;
    plan.limitOfDayDb = limitOfDayDb;
    const contacts = await standingContacts(work.em, plan.id);
    await storeContacts(work, plan, { world, wished: contacts });
    const broken = judgeContacts(world.context, contacts);
    plan.needsAttention =
      broken.length > 0 ? `${broken.length} rules are broken under the new limit.` : null;
    await work.em.flush();
    await audit(work, person, {
      action: 'plan.limit',
      entity: 'plan',
      entityId: plan.id,
      summary: `Limit of ${plan.day}: ${from} dB to ${limitOfDayDb} dB`,
    });
    return plan;
  });
};
