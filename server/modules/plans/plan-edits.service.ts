import type { EntityManager } from '@mikro-orm/sqlite';
import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { Violation } from '../../../shared/schedule/model.ts';
import { can, mayEver, type Action } from '../../../shared/policy.ts';
import type { CreatePlan } from '../../../shared/schemas/plan.ts';
import type { Edit } from '../../../shared/schemas/edit.ts';
import { randomUUID } from 'node:crypto';
import { contains, dayInterval, MINUTE_MS, SECOND_MS, toIso } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person } from '../../deps.ts';
import { conflict, forbidden, ruleBroken, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { audit } from '../audit/audit.service.ts';
import { Face } from '../stations/face.entity.ts';
import { getStation } from '../stations/station.service.ts';
import { applyEdits, type Edited, type FormerContacts } from './apply-edits.ts';
import { Contact } from './contact.entity.ts';
import { standingContacts, storeContacts, tellPlan, type WishedContact } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { presentViolation } from './plan.presenter.ts';
import { getPlan, storedScore } from './plan-read.service.ts';
import type { World, Worlds } from './world.ts';

/** 403 for the person, then 409 for the state. */
export const requireAction = (person: Person, action: Action, plan: DayPlan): void => {
  if (!mayEver(person, action)) throw forbidden('Your role does not allow this.');
  if (!can(person, action, { state: plan.state }))
    throw conflict('wrong-state', `A plan that is ${plan.state} does not allow this.`);
};

/** The tag is judged before any rule and before the state. */
export const requireTag = (plan: DayPlan, ifMatch: string): void =>
  checkTag(ifMatch, plan.id, plan.contentVersion, 'The plan');

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

/** Contacts that have begun, or begin within the freeze time, are left to operational revisions. */
const refuseFrozen = (
  { world, nowMs }: { world: World; nowMs: number },
  before: readonly WishedContact[],
  edited: Edited,
): void => {
  const fromMs = nowMs + world.day.station.freezeTimeSeconds * SECOND_MS;
  const touched = [...before, ...edited.contacts].filter((one) => edited.touched.has(one.id));
  const frozen = touched.find((contact) => contact.receive.fromMs < fromMs);
  if (!frozen) return;
  const minutes = Math.round((world.day.station.freezeTimeSeconds * SECOND_MS) / MINUTE_MS);
  throw conflict(
    'frozen',
    `The contact at ${toIso(frozen.receive.fromMs).slice(11, 19)} has begun or begins within ${minutes} min. Use an operational revision of the released plan.`,
  );
};

const refuseOtherDay = (plan: DayPlan, edited: Edited): void => {
  const day = dayInterval(plan.day);
  const stray = edited.contacts.find(
    ({ id, receive: { fromMs } }) =>
      edited.touched.has(id) && !contains(day, { fromMs, toMs: fromMs + 1 }),
  );
  if (stray)
    throw unprocessable(
      'other-day',
      `A contact belongs to the UTC day in which it begins; ${toIso(stray.receive.fromMs)} is not in ${plan.day}.`,
    );
};

const formerContacts = async (em: EntityManager, edits: Edit[]): Promise<FormerContacts> => {
  const ids = edits.flatMap((edit) => (edit.op === 'restore' ? [edit.contactId] : []));
  const contacts = await em.find(Contact, { id: { $in: ids } });
  return new Map(
    contacts.map((one) => [one.id, { passId: one.pass.id, emergency: one.emergency }]),
  );
};

export interface EditWish {
  planId: string;
  edits: Edit[];
  ifMatch: string;
  dryRun: boolean;
}
export interface EditOutcome {
  plan: DayPlan;
  edited: Edited;
  removedIds: string[];
  violations: Violation[];
}

/** Judges edits together on their result; writes all or none. A dry run answers the violations instead of refusing. */
export const editPlan = async (
  deps: Deps,
  worlds: Worlds,
  { person, wish }: { person: Person; wish: EditWish },
): Promise<EditOutcome> => {
  const seen = await getPlan(reader(deps), wish.planId);
  if (!mayEver(person, 'plan.edit')) throw forbidden('Your role does not allow this.');
  if (!wish.dryRun) requireTag(seen, wish.ifMatch);
  const world = await worlds.of(seen);
  return inTransaction(deps, async (work) => {
    const plan = await getPlan(work.em, wish.planId);
    if (!wish.dryRun) requireTag(plan, wish.ifMatch);
    requireAction(person, 'plan.edit', plan);
    const before = await standingContacts(work.em, plan.id);
    const edited = applyEdits(world, {
      contacts: before,
      former: await formerContacts(work.em, wish.edits),
      edits: wish.edits,
    });
    const removedIds = before
      .filter((one) => !edited.contacts.some(({ id }) => id === one.id))
      .map(({ id }) => id);
    // What was broken before and is not touched is shown on the plan, but does not stop an edit elsewhere.
    const violations = judgeContacts(world.context, edited.contacts).filter((violation) =>
      violation.contactIds.some((id) => edited.touched.has(id)),
    );
    if (wish.dryRun) return { plan, edited, removedIds, violations };
    if (violations.length > 0) throw ruleBroken(violations.map(presentViolation));
    refuseFrozen({ world, nowMs: work.nowMs }, before, edited);
    refuseOtherDay(plan, edited);
    await storeContacts(work, plan, { world, wished: edited.contacts });
    await audit(work, person, {
      action: 'plan.edit',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}: ${wish.edits.map((edit) => edit.op).join(', ')}`,
      details: { edits: wish.edits, inverse: edited.inverse },
    });
    return { plan, edited, removedIds, violations: [] };
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
