import { randomUUID } from 'node:crypto';
import { allowedIntervalsIn } from '../../../shared/schedule/allowed-intervals.ts';
import type {
  ContactModel,
  Direction,
  LegModel,
  PassModel,
} from '../../../shared/schedule/model.ts';
import { servicesOf } from '../../../shared/schedule/services.ts';
import type { Edit } from '../../../shared/schemas/edit.ts';
import { fromIso, intersect, roundInward, toIso, type Interval } from '../../../shared/time.ts';
import { notFound, unprocessable } from '../../errors.ts';
import type { WishedContact } from './contact-store.ts';
import type { World } from './world.ts';

/** Contacts that left a plan earlier and may come back under their own identity. */
export type FormerContacts = ReadonlyMap<string, Pick<WishedContact, 'passId' | 'emergency'>>;

interface Desk {
  world: World;
  contacts: Map<string, WishedContact>;
  former: FormerContacts;
}
interface LegWish {
  channelId: string;
  fromUtc?: string | undefined;
  toUtc?: string | undefined;
}

const passOf = ({ world }: Desk, passId: string): PassModel => {
  const pass = world.context.passes.get(passId);
  if (!pass) throw notFound('The pass');
  return pass;
};

const faceOf = ({ world }: Desk, channelId: string, direction: Direction): string => {
  const channel = world.context.channels.get(channelId);
  if (!channel) throw notFound('The channel');
  if (channel.direction !== direction)
    throw unprocessable('wrong-direction', `${channel.label} is a ${channel.direction} channel.`);
  return channel.faceId;
};

const longest = (intervals: readonly Interval[]): Interval | undefined =>
  [...intervals].sort((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs))[0];

interface LegQuestion {
  wish: LegWish;
  passId: string;
  contactId: string;
  direction: Direction;
  within: Interval | null;
}

/** Times that are left out become the longest part that is allowed there, else of the usable window, else of the pass. */
const resolveLeg = (desk: Desk, question: LegQuestion): LegModel => {
  const { wish, passId, contactId, direction, within } = question;
  const faceId = faceOf(desk, wish.channelId, direction);
  const wishedFrom = wish.fromUtc === undefined ? null : wholeSecond(wish.fromUtc);
  const wishedTo = wish.toUtc === undefined ? null : wholeSecond(wish.toUtc);
  if (wishedFrom !== null && wishedTo !== null)
    return leg(wish.channelId, { fromMs: wishedFrom, toMs: wishedTo });
  const { context, facts } = desk.world;
  const allowed = allowedIntervalsIn(context, {
    contacts: [...desk.contacts.values()],
    channelId: wish.channelId,
    passId,
    ignoreContactId: contactId,
  });
  const windows = facts.windows.filter(
    (one) => one.passId === passId && one.faceId === faceId && one.direction === direction,
  );
  const clip = (intervals: readonly Interval[]) =>
    intervals.flatMap((one) => roundInward((within ? intersect(one, within) : one) ?? one) ?? []);
  const standard =
    longest(clip(allowed)) ?? longest(clip(windows)) ?? roundInward(passOf(desk, passId));
  if (!standard) throw unprocessable('no-window', 'The pass has no usable second on that channel.');
  return leg(wish.channelId, {
    fromMs: wishedFrom ?? standard.fromMs,
    toMs: wishedTo ?? standard.toMs,
  });
};

const wholeSecond = (utc: string): number => Math.round(fromIso(utc) / 1000) * 1000;

const leg = (channelId: string, { fromMs, toMs }: Interval): LegModel => {
  if (fromMs >= toMs) throw unprocessable('empty-leg', 'A leg ends after it begins.');
  return { channelId, fromMs, toMs };
};

/** When nothing was said about the uplink: one is taken where the service wants it and a channel has room. */
const uplinkFor = (desk: Desk, contact: ContactModel): LegModel | null => {
  const { world } = desk;
  const satellite = world.context.satellites.get(contact.satelliteId);
  const wants = servicesOf(world.day, passOf(desk, contact.passId)).some(
    (service) => service.uplink !== 'none',
  );
  if (!satellite?.uplink || !wants) return null;
  const room = world.day.channels
    .filter((one) => one.direction === 'transmit' && one.faceId === contact.faceId)
    .flatMap((channel) =>
      allowedIntervalsIn(world.context, {
        contacts: [...desk.contacts.values()],
        channelId: channel.id,
        passId: contact.passId,
        ignoreContactId: contact.id,
      }).flatMap((one) => {
        const part = intersect(one, contact.receive);
        const whole = part && roundInward(part);
        return whole ? [{ channelId: channel.id, ...whole }] : [];
      }),
    );
  return (longest(room) as LegModel | undefined) ?? null;
};

const wishOf = (one: LegModel) => ({
  channelId: one.channelId,
  fromUtc: toIso(one.fromMs),
  toUtc: toIso(one.toMs),
});

const restoreOf = (contact: WishedContact): Edit => ({
  op: 'restore',
  contactId: contact.id,
  receive: wishOf(contact.receive),
  transmit: contact.transmit && wishOf(contact.transmit),
  locked: contact.locked,
});
const changeBack = (contact: WishedContact): Edit => ({
  op: 'change',
  contactId: contact.id,
  receive: wishOf(contact.receive),
  transmit: contact.transmit && wishOf(contact.transmit),
  locked: contact.locked,
  note: contact.note,
});

const assign = (desk: Desk, edit: Extract<Edit, { op: 'assign' }>): Edit => {
  const pass = passOf(desk, edit.passId);
  const id = randomUUID();
  const receive = resolveLeg(desk, {
    wish: edit.receive,
    passId: pass.id,
    contactId: id,
    direction: 'receive',
    within: null,
  });
  const contact: WishedContact = {
    id,
    passId: pass.id,
    predictionId: pass.predictionId,
    satelliteId: pass.satelliteId,
    missionId: pass.missionId,
    faceId: faceOf(desk, edit.receive.channelId, 'receive'),
    receive,
    transmit: null,
    locked: edit.locked ?? false,
    note: edit.note ?? '',
    emergency: false,
  };
  contact.transmit =
    edit.transmit === undefined
      ? uplinkFor(desk, contact)
      : transmitOf(desk, contact, edit.transmit);
  desk.contacts.set(id, contact);
  return { op: 'remove', contactId: id };
};

const transmitOf = (desk: Desk, contact: WishedContact, wish: LegWish | null): LegModel | null =>
  wish &&
  resolveLeg(desk, {
    wish,
    passId: contact.passId,
    contactId: contact.id,
    direction: 'transmit',
    within: contact.receive,
  });

const standing = (desk: Desk, contactId: string): WishedContact => {
  const contact = desk.contacts.get(contactId);
  if (!contact) throw notFound('The contact');
  return contact;
};

/** A leg keeps what the edit does not name. */
const merged = (before: LegModel, wish: Partial<LegWish>): LegWish => ({
  channelId: wish.channelId ?? before.channelId,
  fromUtc: wish.fromUtc ?? toIso(before.fromMs),
  toUtc: wish.toUtc ?? toIso(before.toMs),
});

const change = (desk: Desk, edit: Extract<Edit, { op: 'change' }>): Edit => {
  const before = standing(desk, edit.contactId);
  const after: WishedContact = { ...before };
  if (edit.receive) {
    const wish = merged(before.receive, edit.receive);
    after.faceId = faceOf(desk, wish.channelId, 'receive');
    after.receive = leg(wish.channelId, {
      fromMs: wholeSecond(wish.fromUtc ?? ''),
      toMs: wholeSecond(wish.toUtc ?? ''),
    });
    // The uplink of a trimmed contact ends with it; where nothing is left, the rules say so.
    const part = before.transmit && intersect(before.transmit, after.receive);
    if (before.transmit && edit.transmit === undefined)
      after.transmit = part ? { channelId: before.transmit.channelId, ...part } : null;
  }
  if (edit.transmit !== undefined) after.transmit = changedTransmit(desk, after, edit.transmit);
  if (edit.locked !== undefined) after.locked = edit.locked;
  if (edit.note !== undefined) after.note = edit.note;
  // Whoever changes the times plans on the pass as it is predicted now.
  const pass = desk.world.context.passes.get(after.passId);
  if (pass && (edit.receive || edit.transmit)) after.predictionId = pass.predictionId;
  desk.contacts.set(after.id, after);
  return changeBack(before);
};

const changedTransmit = (
  desk: Desk,
  contact: WishedContact,
  wish: Partial<LegWish> | null,
): LegModel | null => {
  if (wish === null) return null;
  const channelId = wish.channelId ?? contact.transmit?.channelId;
  if (!channelId) throw unprocessable('no-channel', 'Name the channel of the transmit leg.');
  if (contact.transmit && wish.fromUtc === undefined && wish.toUtc === undefined) {
    faceOf(desk, channelId, 'transmit');
    return { ...contact.transmit, channelId };
  }
  return transmitOf(desk, contact, { ...wish, channelId });
};

const restore = (desk: Desk, edit: Extract<Edit, { op: 'restore' }>): Edit => {
  const former = desk.former.get(edit.contactId);
  if (!former || desk.contacts.has(edit.contactId)) throw notFound('The contact');
  const pass = passOf(desk, former.passId);
  const times = (wish: Required<LegWish>): LegModel =>
    leg(wish.channelId, {
      fromMs: wholeSecond(wish.fromUtc ?? ''),
      toMs: wholeSecond(wish.toUtc ?? ''),
    });
  desk.contacts.set(edit.contactId, {
    id: edit.contactId,
    passId: pass.id,
    predictionId: pass.predictionId,
    satelliteId: pass.satelliteId,
    missionId: pass.missionId,
    faceId: faceOf(desk, edit.receive.channelId, 'receive'),
    receive: times(edit.receive),
    transmit: edit.transmit && times(edit.transmit),
    locked: edit.locked,
    note: '',
    emergency: former.emergency,
  });
  return { op: 'remove', contactId: edit.contactId };
};

const apply = (desk: Desk, edit: Edit): Edit => {
  if (edit.op === 'assign') return assign(desk, edit);
  if (edit.op === 'change') return change(desk, edit);
  if (edit.op === 'restore') return restore(desk, edit);
  const contact = standing(desk, edit.contactId);
  desk.contacts.delete(edit.contactId);
  return restoreOf(contact);
};

export interface Edited {
  contacts: WishedContact[];
  /** Edits that undo these, in their order. */
  inverse: Edit[];
  touched: Set<string>;
}

/** Applies edits one after the other without judging: the rules look at the result, so two contacts can swap. */
export const applyEdits = (
  world: World,
  { contacts, former, edits }: { contacts: WishedContact[]; former: FormerContacts; edits: Edit[] },
): Edited => {
  const desk: Desk = {
    world,
    contacts: new Map(contacts.map((contact) => [contact.id, contact])),
    former,
  };
  const inverse = edits.map((edit) => apply(desk, edit)).reverse();
  const before = new Map(contacts.map((contact) => [contact.id, contact]));
  const touched = new Set<string>();
  for (const contact of desk.contacts.values())
    if (before.get(contact.id) !== contact) touched.add(contact.id);
  for (const id of before.keys()) if (!desk.contacts.has(id)) touched.add(id);
  return {
    contacts: [...desk.contacts.values()].sort((a, b) => a.receive.fromMs - b.receive.fromMs),
    inverse,
    touched,
  };
};
