import type { PlanContext } from './context.ts';
import { holding } from './holding.ts';
import type {
  ChannelModel,
  ContactModel,
  Direction,
  LegModel,
  PassModel,
  SatelliteModel,
} from './model.ts';
import type { Interval } from '../time.ts';

/** A leg with all it refers to; `own` is false for contacts of the neighbouring days. */
export interface PlanLeg {
  contact: ContactModel;
  direction: Direction;
  leg: LegModel;
  own: boolean;
  channel: ChannelModel | undefined;
  satellite: SatelliteModel | undefined;
  pass: PassModel | undefined;
  /** What it takes of its channel. */
  held: Interval;
}

export const directionWord = (direction: Direction): string =>
  direction === 'receive' ? 'downlink' : 'uplink';

function legOf(
  context: PlanContext,
  contact: ContactModel,
  direction: Direction,
  own: boolean,
): PlanLeg | null {
  const leg = direction === 'receive' ? contact.receive : contact.transmit;
  if (!leg) return null;
  const channel = context.channels.get(leg.channelId);
  const satellite = context.satellites.get(contact.satelliteId);
  const pass = context.passes.get(contact.passId);
  const held = channel ? holding(leg, channel, satellite) : leg;
  return { contact, direction, leg, own, channel, satellite, pass, held };
}

const DIRECTIONS: readonly Direction[] = ['receive', 'transmit'];

/** Every leg of the plan and of the neighbouring days' contacts. */
export function planLegs(context: PlanContext, contacts: readonly ContactModel[]): PlanLeg[] {
  const ids = new Set(contacts.map((contact) => contact.id));
  const neighbours = context.day.neighbours.filter((contact) => !ids.has(contact.id));
  const legs = (contact: ContactModel, own: boolean): PlanLeg[] =>
    DIRECTIONS.flatMap((direction) => legOf(context, contact, direction, own) ?? []);
  return [
    ...contacts.flatMap((contact) => legs(contact, true)),
    ...neighbours.flatMap((contact) => legs(contact, false)),
  ];
}

/** Pairs of legs whose intervals overlap and of which at least one belongs to the plan, the earlier one first. */
export function overlappingPairs(
  legs: readonly PlanLeg[],
  intervalOf: (leg: PlanLeg) => Interval,
): [PlanLeg, PlanLeg][] {
  const sorted = [...legs].sort((a, b) => intervalOf(a).fromMs - intervalOf(b).fromMs);
  const pairs: [PlanLeg, PlanLeg][] = [];
  let active: PlanLeg[] = [];
  for (const leg of sorted) {
    active = active.filter((other) => intervalOf(other).toMs > intervalOf(leg).fromMs);
    for (const other of active) if (leg.own || other.own) pairs.push([other, leg]);
    active.push(leg);
  }
  return pairs;
}

export function groupBy<T>(items: readonly T[], keyOf: (item: T) => string): T[][] {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const list = groups.get(keyOf(item));
    if (list) list.push(item);
    else groups.set(keyOf(item), [item]);
  }
  return [...groups.values()];
}
