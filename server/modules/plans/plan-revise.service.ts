import { randomUUID } from 'node:crypto';
import { inTransaction, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { PlannedContact } from './contact.entity.ts';
import { tellPlan } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { nextRevision, unreleasedPlan } from './plan-create.service.ts';
import { beginStep, reread, type LifeWish } from './plan-steps.ts';

/** A new revision starts as a copy of the released one. */
export const revisePlan = async (deps: Deps, wish: LifeWish): Promise<DayPlan> => {
  await beginStep(deps, wish, 'plan.revise');
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    const open = await unreleasedPlan(work.em, plan.station.id, plan.day);
    if (open)
      throw conflict('revision-open', `Revision ${open.revision} of this day is ${open.state}.`, {
        planId: open.id,
      });
    const copy = await copyRevision(work, plan, { person: wish.person, state: 'draft' });
    await audit(work, wish.person, {
      action: 'plan.revise',
      entity: 'plan',
      entityId: copy.id,
      summary: `Revision ${copy.revision} of ${plan.day} begun from revision ${plan.revision}`,
    });
    return copy;
  });
};

export const copyRevision = async (
  work: Work,
  plan: DayPlan,
  { person, state }: { person: Person; state: DayPlan['state'] },
): Promise<DayPlan> => {
  const { em, nowMs } = work;
  const copy = em.create(DayPlan, {
    id: randomUUID(),
    station: plan.station.id,
    day: plan.day,
    revision: await nextRevision(em, plan.station.id, plan.day),
    state,
    limitOfDayDb: plan.limitOfDayDb,
    score: plan.score,
    hasBeenReviewed: true,
    createdMs: nowMs,
    updatedMs: nowMs,
    createdById: person.id,
  });
  await em.flush();
  for (const row of await em.find(PlannedContact, { plan: plan.id }))
    em.create(PlannedContact, {
      id: randomUUID(),
      plan: copy.id,
      contact: row.contact.id,
      prediction: row.prediction.id,
      face: row.face.id,
      receiveChannel: row.receiveChannel.id,
      receiveFromMs: row.receiveFromMs,
      receiveToMs: row.receiveToMs,
      transmitChannel: row.transmitChannel?.id ?? null,
      transmitFromMs: row.transmitFromMs ?? null,
      transmitToMs: row.transmitToMs ?? null,
      locked: row.locked,
      note: row.note,
    });
  await em.flush();
  tellPlan(work, copy);
  return copy;
};
