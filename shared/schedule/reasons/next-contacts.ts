import { intersect, roundInward, type Interval } from '../../time.ts';
import { blockedIntervals, type Blocked } from '../blocked.ts';
import { missionName, satelliteName, type PlanContext } from '../context.ts';
import { subtract } from '../intervals.ts';
import type {
  ChannelModel,
  ContactModel,
  Direction,
  LegModel,
  PassModel,
  SatelliteModel,
  UsableWindow,
} from '../model.ts';
import { fitsChannel, radioFor } from '../radio-fit.ts';
import { servicesOf } from '../services.ts';
import { clock, clockSpan, spoken } from '../words.ts';
import { placeWords } from './freeing.ts';
import { holdsTogether, nearby, type Nearby } from './nearby.ts';
import { contactWith, placeContact } from './placement.ts';

/** A day with the plan that is in force for it. */
export interface PlannedDay {
  context: PlanContext;
  contacts: readonly ContactModel[];
}

/** The next chance to reach a satellite on one face. */
export interface NextContactChance {
  /** Index of the day in the question. */
  dayIndex: number;
  passId: string;
  faceId: string;
  fromMs: number;
  toMs: number;
  maxElevationDeg: number;
  /** null: the window is there, but no channel of the face can be had (closed, unfit, or held by a neighbouring day). */
  receive: LegModel | null;
  transmit: LegModel | null;
  /** Contacts that would have to go. */
  displaces: ContactModel[];
  words: string;
}

export interface NextContactQuestion {
  days: readonly PlannedDay[];
  satelliteId: string;
  fromMs: number;
  needsUplink: boolean;
  limit: number;
}

interface Chance {
  near: Nearby;
  pass: PassModel;
  satellite: SatelliteModel;
  /** The window from now on. */
  window: UsableWindow;
  span: Interval;
  needsUplink: boolean;
}

/** A leg over what closures and the neighbouring days leave, and the contacts that must go for it. */
interface Taken {
  leg: LegModel;
  displaced: ContactModel[];
}

/** Contacts of this plan that stand in a leg; null where something stands there that cannot go. */
function displacedBy(
  chance: Chance,
  blocked: readonly Blocked[],
  leg: Interval,
  channel: ChannelModel,
): ContactModel[] | null {
  const own = new Set(chance.near.contacts);
  const gone = new Set<ContactModel>();
  for (const one of blocked) {
    if (!intersect(one, leg)) continue;
    const contacts = one.legs.map(({ contact }) => contact);
    if (one.rule !== 'transmit-limit') {
      for (const contact of contacts) gone.add(contact);
      continue;
    }
    // Of a full set of transmit beams only as many go as are too many: the shortest ones.
    const limit = chance.near.context.faces.get(channel.faceId)?.transmitBeamLimit ?? 0;
    const on = contacts
      .filter((contact) => !gone.has(contact))
      .toSorted((a, b) => length(a.transmit) - length(b.transmit));
    for (const contact of on.slice(0, Math.max(0, on.length - limit + 1))) gone.add(contact);
  }
  return [...gone].every((contact) => own.has(contact)) ? [...gone] : null;
}

const length = (span: Interval | null): number => (span ? span.toMs - span.fromMs : 0);
const lost = (contacts: readonly ContactModel[]): number =>
  contacts.reduce((sum, { receive }) => sum + length(receive), 0);

const cannotGo = ({ near }: Chance, { rule, legs }: Blocked): boolean =>
  // The satellite's own contact is no obstacle to be thrown out: it is reached there already.
  rule === 'closure' ||
  rule === 'duplicate' ||
  legs.some(({ contact }) => !near.contacts.includes(contact));

/** The way on any channel of the face that costs others least. */
function cheapest(chance: Chance, direction: Direction, within: Interval): Taken | null {
  const { near, pass, satellite, window } = chance;
  const radio = radioFor(satellite, direction);
  if (!radio) return null;
  const ways = near.context.day.channels
    .filter(
      (one) =>
        one.faceId === window.faceId && one.direction === direction && fitsChannel(one, radio),
    )
    .flatMap((channel): Taken[] => {
      const blocked = blockedIntervals(near.context, { pass, satellite, channel }, near.legs);
      const fixed = blocked.filter((one) => cannotGo(chance, one));
      const pieces = subtract(within, fixed).flatMap((piece) => roundInward(piece) ?? []);
      return pieces.flatMap((piece) => {
        const displaced = displacedBy(chance, blocked, piece, channel);
        return displaced ? [{ leg: { channelId: channel.id, ...piece }, displaced }] : [];
      });
    });
  return (
    ways.toSorted(
      (a, b) => lost(a.displaced) - lost(b.displaced) || length(b.leg) - length(a.leg),
    )[0] ?? null
  );
}

/** The transmit window inside a downlink that is longest. */
function uplinkSpan({ near, pass, window }: Chance, receive: Interval): Interval | null {
  const parts = near.context
    .windowsOf(pass.id, window.faceId, 'transmit')
    .flatMap((one) => intersect(one, receive) ?? []);
  return parts.toSorted((a, b) => length(b) - length(a))[0] ?? null;
}

/** A contact that displaces others, tried out without them; null where that does not do either. */
function displacing(chance: Chance): { contact: ContactModel; displaced: ContactModel[] } | null {
  const { near, pass, window, span, needsUplink } = chance;
  const receive = cheapest(chance, 'receive', span);
  if (!receive) return null;
  const wantsUplink =
    needsUplink || servicesOf(near.context.day, pass).some(({ uplink }) => uplink === 'required');
  const inside = wantsUplink ? uplinkSpan(chance, receive.leg) : null;
  const transmit = inside && cheapest(chance, 'transmit', inside);
  if (wantsUplink && !transmit) return null;
  const contact = contactWith(pass, window.faceId, receive.leg, transmit?.leg ?? null);
  const displaced = [...new Set([...receive.displaced, ...(transmit?.displaced ?? [])])];
  const rest = near.contacts.filter((one) => !displaced.includes(one));
  return holdsTogether(near.context, [...rest, contact]) ? { contact, displaced } : null;
}

function chanceOf(dayIndex: number, chance: Chance): NextContactChance {
  const { near, pass, satellite, window, span } = chance;
  const base = {
    dayIndex,
    passId: pass.id,
    faceId: window.faceId,
    maxElevationDeg: pass.maxElevationDeg,
  };
  const told = (
    contact: ContactModel,
    displaces: ContactModel[],
    words: string,
  ): NextContactChance => ({
    ...base,
    fromMs: contact.receive.fromMs,
    toMs: contact.receive.toMs,
    receive: contact.receive,
    transmit: contact.transmit,
    displaces,
    words,
  });
  const planned = near.contacts.find(({ passId }) => passId === pass.id);
  if (planned && planned.faceId === window.faceId)
    return told(
      planned,
      [],
      `${satellite.name} is planned already, ${placeWords(near.context, planned)}.`,
    );
  const { needsUplink } = chance;
  const wish = { pass, legs: near.legs, faceId: window.faceId, within: span, needsUplink };
  const free = placeContact(near.context, wish);
  if (free) return told(free, [], `Free ${placeWords(near.context, free)}.`);
  const forced = displacing(chance);
  if (forced) {
    const whom = forced.displaced.map(
      ({ satelliteId, missionId, receive }) =>
        `${satelliteName(near.context, satelliteId)} at ${clock(receive.fromMs)} (${missionName(near.context, missionId)})`,
    );
    return told(
      forced.contact,
      forced.displaced,
      `${capital(placeWords(near.context, forced.contact))} if ${whom.join(' and ')} ${whom.length === 1 ? 'gives' : 'give'} way.`,
    );
  }
  const words = `In sight from ${clockSpan(span)}, but ${whyNothing(chance)}.`;
  return { ...base, ...span, receive: null, transmit: null, displaces: [], words };
}

function whyNothing({ near, pass, span }: Chance): string {
  const services = servicesOf(near.context.day, pass);
  const minimumMs = Math.min(...services.map((service) => service.minimumMs));
  return length(span) < minimumMs
    ? `too short for its service, which needs ${spoken(minimumMs)}`
    : 'no channel can be had';
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/**
 * The next windows of a satellite on all faces, soonest first, each with the channels it could have and what it would
 * displace and whose. Every answer with channels was tried out: with the displaced contacts gone no rule is broken.
 */
export function nextContacts(question: NextContactQuestion): NextContactChance[] {
  const { days, satelliteId, fromMs, needsUplink, limit } = question;
  const found = days.flatMap(({ context, contacts }, dayIndex) => {
    const satellite = context.satellites.get(satelliteId);
    const { day } = context.day;
    if (!satellite) return [];
    return context.day.passes
      .filter((pass) => pass.satelliteId === satelliteId && pass.toMs > fromMs)
      .flatMap((pass) =>
        context.day.faces.flatMap(({ id }) =>
          context.windowsOf(pass.id, id, 'receive').map((window) => ({ pass, window })),
        ),
      )
      .flatMap(({ pass, window }) => {
        const later = roundInward({
          fromMs: Math.max(window.fromMs, fromMs, day.fromMs),
          toMs: window.toMs,
        });
        return later && later.fromMs < day.toMs ? [{ pass, window, span: later }] : [];
      })
      .map((one) => ({ ...one, dayIndex, context, contacts, satellite }));
  });
  return found
    .toSorted((a, b) => a.span.fromMs - b.span.fromMs || b.span.toMs - a.span.toMs)
    .slice(0, limit)
    .map(({ dayIndex, context, contacts, satellite, pass, window, span }) =>
      chanceOf(dayIndex, {
        near: nearby(context, contacts, pass),
        pass,
        satellite,
        window,
        span,
        needsUplink,
      }),
    )
    .toSorted((a, b) => a.fromMs - b.fromMs);
}
