import { holding } from '../../../shared/schedule/holding.ts';
import { union } from '../../../shared/schedule/intervals.ts';
import type { PlanContext } from '../../../shared/schedule/context.ts';
import type {
  ContactModel,
  Direction,
  LegModel,
  SatelliteModel,
} from '../../../shared/schedule/model.ts';
import type { Interval } from '../../../shared/time.ts';

export interface FixedLeg {
  contact: ContactModel;
  leg: LegModel;
}

/** Contacts that stand whatever the solver does: the neighbouring days', locks that hold, what a repair leaves alone. */
export interface FixedPlan {
  contacts: readonly ContactModel[];
  /** What is taken of a channel, disjoint. */
  heldOn: (channelId: string) => Interval[];
  legsOn: (faceId: string, direction: Direction) => readonly FixedLeg[];
  downlinksOf: (satelliteId: string) => readonly LegModel[];
  servesPass: (passId: string) => boolean;
}

function pushTo<T>(map: Map<string, T[]>, key: string, value: T): void {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
}

function held(
  context: PlanContext,
  leg: LegModel,
  satellite: SatelliteModel | undefined,
): Interval {
  const channel = context.channels.get(leg.channelId);
  return channel ? holding(leg, channel, satellite) : leg;
}

export function fixedPlan(context: PlanContext, contacts: readonly ContactModel[]): FixedPlan {
  const byChannel = new Map<string, Interval[]>();
  const byBeam = new Map<string, FixedLeg[]>();
  const bySatellite = new Map<string, LegModel[]>();
  const passes = new Set<string>();
  for (const contact of contacts) {
    const satellite = context.satellites.get(contact.satelliteId);
    passes.add(contact.passId);
    pushTo(bySatellite, contact.satelliteId, contact.receive);
    pushTo(byChannel, contact.receive.channelId, held(context, contact.receive, satellite));
    pushTo(byBeam, `${contact.faceId}|receive`, { contact, leg: contact.receive });
    if (!contact.transmit) continue;
    pushTo(byChannel, contact.transmit.channelId, held(context, contact.transmit, satellite));
    pushTo(byBeam, `${contact.faceId}|transmit`, { contact, leg: contact.transmit });
  }
  return {
    contacts,
    heldOn: (channelId) => union(byChannel.get(channelId) ?? []),
    legsOn: (faceId, direction) => byBeam.get(`${faceId}|${direction}`) ?? [],
    downlinksOf: (satelliteId) => bySatellite.get(satelliteId) ?? [],
    servesPass: (passId) => passes.has(passId),
  };
}
