import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import type { Work } from '../../deps.ts';
import { Contact, PlannedContact } from './contact.entity.ts';
import { toContactModel } from './contact-model.ts';
import { contactsOf } from './day-model.ts';
import type { DayPlan } from './plan.entity.ts';
import { storedScore } from './plan-read.service.ts';
import type { World } from './world.ts';

/** A contact as it is to stand in a plan, with what the planner does not look at. */
export interface WishedContact extends ContactModel {
  note: string;
  emergency: boolean;
}

const fields = (wish: WishedContact) => ({
  prediction: wish.predictionId,
  face: wish.faceId,
  receiveChannel: wish.receive.channelId,
  receiveFromMs: wish.receive.fromMs,
  receiveToMs: wish.receive.toMs,
  transmitChannel: wish.transmit?.channelId ?? null,
  transmitFromMs: wish.transmit?.fromMs ?? null,
  transmitToMs: wish.transmit?.toMs ?? null,
  locked: wish.locked,
  note: wish.note,
});

/** Writes a plan's contacts as a difference: identities that stay keep their rows. Bumps the content's version. */
export const storeContacts = async (
  work: Work,
  plan: DayPlan,
  { world, wished }: { world: World; wished: readonly WishedContact[] },
): Promise<void> => {
  const { em, nowMs } = work;
  const rows = await em.find(PlannedContact, { plan: plan.id });
  const byContact = new Map(rows.map((row) => [row.contact.id, row]));
  for (const wish of wished) {
    const row = byContact.get(wish.id);
    byContact.delete(wish.id);
    if (row) {
      em.assign(row, fields(wish));
      continue;
    }
    await ensureContact(work, wish);
    em.create(PlannedContact, {
      id: randomUUID(),
      plan: plan.id,
      contact: wish.id,
      ...fields(wish),
    });
  }
  for (const row of byContact.values()) em.remove(row);
  plan.contentVersion += 1;
  plan.updatedMs = nowMs;
  plan.needsAttention = null;
  plan.score = storedScore(world, wished);
  await em.flush();
  tellPlan(work, plan);
};

const ensureContact = async ({ em, nowMs }: Work, wish: WishedContact): Promise<void> => {
  if (await em.findOne(Contact, wish.id)) return;
  em.create(Contact, {
    id: wish.id,
    pass: wish.passId,
    satellite: wish.satelliteId,
    emergency: wish.emergency,
    createdMs: nowMs,
  });
  await em.flush();
};

export const tellPlan = (work: Work, plan: DayPlan): void =>
  work.tell({
    topic: 'plan',
    id: plan.id,
    version: plan.contentVersion,
    stationId: plan.station.id,
    day: plan.day,
  });

/** The contacts of a plan as they stand, ready to be changed. */
export const standingContacts = async (
  em: EntityManager,
  planId: string,
): Promise<WishedContact[]> =>
  (await contactsOf(em, [planId])).map((row) => ({
    ...toContactModel(row),
    note: row.note,
    emergency: row.contact.emergency,
  }));
