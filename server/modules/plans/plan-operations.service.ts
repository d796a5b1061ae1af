import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import { mayEver } from '../../../shared/policy.ts';
import type { Edit, OperationalChange } from '../../../shared/schemas/edit.ts';
import { dayInterval, DAY_MS, toIso } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person } from '../../deps.ts';
import { conflict, forbidden, notFound, ruleBroken, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { applyEdits, type Edited } from './apply-edits.ts';
import { confirmPlan } from './confirm.ts';
import { Contact } from './contact.entity.ts';
import { standingContacts, storeContacts, type WishedContact } from './contact-store.ts';
import { missionPart, partStands } from './mission-part.ts';
import type { DayPlan } from './plan.entity.ts';
import { unreleasedPlan } from './plan-create.service.ts';
import { requireAction, requireTag } from './plan-steps.ts';
import { putInForce } from './plan-release.service.ts';
import { copyRevision } from './plan-revise.service.ts';
import { mailLeads } from './plan-mails.ts';
import { presentViolation } from './plan.presenter.ts';
import { getPlan } from './plan-read.service.ts';
import type { World, Worlds } from './world.ts';

interface OperationWish {
  person: Person;
  planId: string;
  change: OperationalChange;
  ifMatch: string;
}

const contactOf = (contacts: readonly WishedContact[], id: string): WishedContact => {
  const contact = contacts.find((one) => one.id === id);
  if (!contact) throw notFound('The contact');
  return contact;
};

/** Only ever shorter: both ends stay inside the leg that was released. */
const shortened = (
  contact: WishedContact,
  { fromUtc, toUtc }: Extract<OperationalChange, { kind: 'shorten' }>,
): Edit => {
  const from = fromUtc ?? toIso(contact.receive.fromMs);
  const to = toUtc ?? toIso(contact.receive.toMs);
  if (Date.parse(from) < contact.receive.fromMs || Date.parse(to) > contact.receive.toMs)
    throw unprocessable('not-shorter', 'A contact is only ever shortened here.');
  return { op: 'change', contactId: contact.id, receive: { fromUtc: from, toUtc: to } };
};

/** Displacing needs a spacecraft emergency and never displaces another one. */
const displacing = (
  contacts: readonly WishedContact[],
  change: Extract<OperationalChange, { kind: 'add-urgent' }>,
): Edit[] => {
  if (change.displaces.length > 0 && !change.spacecraftEmergency)
    throw conflict('emergency-needed', 'Only a spacecraft emergency displaces other contacts.');
  return change.displaces.map((id) => {
    if (contactOf(contacts, id).emergency)
      throw conflict('emergency-displaced', 'An emergency never displaces another emergency.');
    return { op: 'remove', contactId: id };
  });
};

const editsOf = (contacts: readonly WishedContact[], change: OperationalChange): Edit[] => {
  if (change.kind === 'cancel') {
    contactOf(contacts, change.contactId);
    return [{ op: 'remove', contactId: change.contactId }];
  }
  if (change.kind === 'shorten') return [shortened(contactOf(contacts, change.contactId), change)];
  if (change.kind === 'move-leg') {
    contactOf(contacts, change.contactId);
    const { contactId, channelId, direction } = change;
    return [{ op: 'change', contactId, [direction]: { channelId } }];
  }
  return [
    ...displacing(contacts, change),
    {
      op: 'assign',
      passId: change.passId,
      receive: change.receive,
      ...(change.transmit !== undefined && { transmit: change.transmit }),
      note: change.reason,
    },
  ];
};

/** A day is running from its beginning to its end; an urgent contact may also be put into a coming day. */
const requireRunningDay = (plan: DayPlan, nowMs: number): void => {
  const { toMs } = dayInterval(plan.day);
  if (nowMs >= toMs + DAY_MS)
    throw conflict('day-over', `${plan.day} is over; its plan is history.`);
};

/**
 * Repairs the running day without sign-off: a new revision, judged by the same rules and the same check,
 * released at once with reason, caller, who and when. Mails only the missions whose times or services changed.
 */
export const operate = async (
  deps: Deps,
  worlds: Worlds,
  { person, planId, change, ifMatch }: OperationWish,
): Promise<{ plan: DayPlan; edited: Edited }> => {
  const seen = await getPlan(reader(deps), planId);
  if (!mayEver(person, 'plan.operate')) throw forbidden('Your role does not allow this.');
  requireTag(seen, ifMatch);
  requireAction(person, 'plan.operate', seen);
  requireRunningDay(seen, deps.clock.now());
  const world = await worlds.of(seen);
  const before = await standingContacts(reader(deps), planId);
  const edited = applyEdits(world, {
    contacts: before,
    former: new Map(),
    edits: editsOf(before, change),
  });
  await confirmEdited(deps, world, edited);
  return inTransaction(deps, async (work) => {
    const plan = await getPlan(work.em, planId);
    requireTag(plan, ifMatch);
    const revision = await copyRevision(work, plan, { person, state: 'approved' });
    revision.operational = {
      kind: change.kind,
      reason: change.reason,
      caller: change.caller,
      byName: person.name,
      atMs: work.nowMs,
    };
    await storeContacts(work, revision, { world, wished: edited.contacts });
    if (change.kind === 'add-urgent' && change.spacecraftEmergency)
      for (const id of edited.touched)
        if (!before.some((one) => one.id === id))
          await work.em.nativeUpdate(Contact, { id }, { emergency: true });
    await putInForce(work, revision, world);
    await tellOpenRevision(work.em, revision);
    await audit(work, person, {
      action: `operate.${change.kind}`,
      entity: 'plan',
      entityId: revision.id,
      summary: `Operational revision ${revision.revision} of ${revision.day}: ${change.kind}, ${change.reason}`,
      details: { ...change },
    });
    await mailChanged(work, { revision, world, before, edited, change });
    return { plan: revision, edited };
  });
};

const confirmEdited = async (deps: Deps, world: World, edited: Edited): Promise<void> => {
  const settled = new Set(
    edited.contacts.filter((one) => !edited.touched.has(one.id)).map((one) => one.id),
  );
  const broken = judgeContacts(world.context, edited.contacts).filter((violation) =>
    violation.contactIds.some((id) => edited.touched.has(id)),
  );
  if (broken.length > 0) throw ruleBroken(broken.map(presentViolation));
  await confirmPlan(deps, world, edited.contacts, settled);
};

/** A revision in somebody's hands was copied from a plan that is now superseded. */
const tellOpenRevision = async (
  em: Parameters<typeof unreleasedPlan>[0],
  revision: DayPlan,
): Promise<void> => {
  const open = await unreleasedPlan(em, revision.station.id, revision.day);
  if (!open) return;
  open.needsAttention = `Operational revision ${revision.revision} was released meanwhile.`;
  await em.flush();
};

const mailChanged = async (
  work: Parameters<typeof mailLeads>[0],
  {
    revision,
    world,
    before,
    edited,
    change,
  }: {
    revision: DayPlan;
    world: World;
    before: WishedContact[];
    edited: Edited;
    change: OperationalChange;
  },
): Promise<void> => {
  const guard = world.day.station.guardTimeSeconds;
  const missions = new Set([...before, ...edited.contacts].map((one) => one.missionId));
  const changed = [...missions].filter(
    (id) => !partStands(missionPart(id, before, []), missionPart(id, edited.contacts, []), guard),
  );
  await mailLeads(work, changed, (missionName) => ({
    event: `operate ${revision.id}`,
    subject: `${missionName}: the running plan of ${revision.day} was changed`,
    lines: [
      `Operational revision ${revision.revision}: ${change.reason}`,
      'It is in force. Please look at it and acknowledge it.',
    ],
  }));
};
