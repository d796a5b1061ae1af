import { intersect, MINUTE_MS, SECOND_MS, type Interval } from '../../time.ts';
import { channelLabel, satelliteName, type PlanContext } from '../context.ts';
import type { ContactModel, LegModel, PassModel } from '../model.ts';
import { planLegs } from '../plan-legs.ts';
import { servicesOf } from '../services.ts';
import { clock, spoken } from '../words.ts';
import { minutesOf, placeWords, type Freeing } from './freeing.ts';
import { holdsTogether, type Nearby } from './nearby.ts';
import { freePieces, placeContact } from './placement.ts';
import { assignEdit, changeEdit, removeEdit } from './plan-edits.ts';

interface Pair {
  near: Nearby;
  /** The others, without the one that gives way. */
  rest: ContactModel[];
  blocker: ContactModel;
  placed: ContactModel;
}

const described = (context: PlanContext, { satelliteId, receive }: ContactModel): string =>
  `${satelliteName(context, satelliteId)} at ${clock(receive.fromMs)}`;

/** The blocker at its own times on other channels of its face. */
function otherChannels({ near, rest, blocker, placed }: Pair): ContactModel | null {
  const { channels } = near.context.day;
  const fitting = (direction: 'receive' | 'transmit', leg: LegModel): LegModel[] => [
    leg,
    ...channels
      .filter((one) => one.faceId === blocker.faceId && one.direction === direction)
      .filter(({ id }) => id !== leg.channelId)
      .map(({ id }) => ({ ...leg, channelId: id })),
  ];
  for (const receive of fitting('receive', blocker.receive))
    for (const transmit of blocker.transmit ? fitting('transmit', blocker.transmit) : [null]) {
      const moved = { ...blocker, receive, transmit };
      if (holdsTogether(near.context, [...rest, placed, moved])) return moved;
    }
  return null;
}

const longest = (pieces: readonly Interval[]): Interval | null =>
  pieces.toSorted((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs))[0] ?? null;

/** The blocker on its own channels, shortened as far as the new contact needs. */
function trimmed({ near, rest, blocker, placed }: Pair): ContactModel | null {
  const { context } = near;
  const pass = context.passes.get(blocker.passId);
  const satellite = context.satellites.get(blocker.satelliteId);
  if (!pass || !satellite) return null;
  const legs = planLegs(context, [...rest, placed]);
  const part = (leg: LegModel, within: Interval): LegModel | null => {
    const channel = context.channels.get(leg.channelId);
    if (!channel) return null;
    const pieces = freePieces(context, { pass, satellite, channel }, legs);
    const left = longest(pieces.flatMap((piece) => intersect(piece, within) ?? []));
    return left && { channelId: leg.channelId, ...left };
  };
  const receive = part(blocker.receive, blocker.receive);
  const inside = receive && blocker.transmit && intersect(receive, blocker.transmit);
  const transmit = inside && blocker.transmit ? part(blocker.transmit, inside) : null;
  if (!receive || (blocker.transmit && !transmit)) return null;
  const shorter = { ...blocker, receive, transmit };
  return holdsTogether(context, [...rest, placed, shorter]) ? shorter : null;
}

function trimWords(context: PlanContext, before: ContactModel, after: ContactModel): string {
  const lostMs =
    after.receive.fromMs - before.receive.fromMs + before.receive.toMs - after.receive.toMs;
  const uplinkMs =
    before.transmit && after.transmit
      ? after.transmit.fromMs - before.transmit.fromMs + before.transmit.toMs - after.transmit.toMs
      : 0;
  const what = lostMs > 0 ? spoken(lostMs) : `${spoken(uplinkMs)} of uplink`;
  const end =
    after.receive.toMs < before.receive.toMs ? `, to end at ${clock(after.receive.toMs)}` : '';
  const begin =
    after.receive.fromMs > before.receive.fromMs
      ? `, to begin at ${clock(after.receive.fromMs)}`
      : '';
  return `Trim ${described(context, before)} by ${what}${begin}${end}`;
}

/** What can become of the blocker once the new contact stands, the gentlest first. */
function yieldTo(pair: Pair): Freeing | null {
  const { near, rest, blocker, placed } = pair;
  const { context } = near;
  const name = satelliteName(context, placed.satelliteId);
  const then = `${name} fits ${placeWords(context, placed)}`;
  const moved = otherChannels(pair);
  if (moved) {
    const channels = [moved.receive, moved.transmit].flatMap((leg) =>
      leg ? [channelLabel(context, leg.channelId)] : [],
    );
    return {
      kind: 'move',
      words: `Move ${described(context, blocker)} to ${channels.join(' and ')}; ${then}.`,
      costMinutes: 0,
      edits: [changeEdit(moved), assignEdit(placed)],
    };
  }
  const shorter = trimmed(pair);
  if (shorter)
    return {
      kind: 'trim',
      words: `${trimWords(context, blocker, shorter)}; ${then}.`,
      costMinutes: Math.max(0, minutesOf(blocker) - minutesOf(shorter)),
      edits: [changeEdit(shorter), assignEdit(placed)],
    };
  const pass = context.passes.get(blocker.passId);
  const legs = planLegs(context, [...rest, placed]);
  const elsewhere = pass && placeContact(context, { pass, legs });
  if (elsewhere && holdsTogether(context, [...rest, placed, elsewhere])) {
    const after = { ...elsewhere, id: blocker.id };
    return {
      kind: 'move',
      words: `Move ${described(context, blocker)} ${placeWords(context, after).replace(/^on/, 'to')}; ${then}.`,
      costMinutes: Math.max(0, minutesOf(blocker) - minutesOf(after)),
      edits: [changeEdit(after), assignEdit(placed)],
    };
  }
  if (!holdsTogether(context, [...rest, placed])) return null;
  const lost = spoken(blocker.receive.toMs - blocker.receive.fromMs);
  return {
    kind: 'drop',
    words: `Drop ${described(context, blocker)} (${lost}); ${then}.`,
    costMinutes: minutesOf(blocker),
    edits: [removeEdit(blocker), assignEdit(placed)],
  };
}

/** Shortest contacts at both ends of where the long one would stand: they hurt a blocker least. */
function shortSpans(placed: ContactModel, minimumMs: number): Interval[] {
  const { fromMs, toMs } = placed.receive;
  const lengthMs = Math.ceil(minimumMs / SECOND_MS) * SECOND_MS;
  if (toMs - fromMs <= lengthMs) return [];
  return [
    { fromMs, toMs: fromMs + lengthMs },
    { fromMs: toMs - lengthMs, toMs },
  ];
}

/** One contact gives way: by another channel, a trim, another place or, at worst, by going. Locked ones never do. */
export function givingWay(near: Nearby, pass: PassModel, blocker: ContactModel): Freeing | null {
  const { context } = near;
  if (blocker.locked) return null;
  const rest = near.contacts.filter((contact) => contact !== blocker);
  const legs = planLegs(context, rest);
  const long = placeContact(context, { pass, legs });
  if (!long) return null;
  const minimumMs = Math.min(...servicesOf(context.day, pass).map((service) => service.minimumMs));
  const short = shortSpans(long, Math.max(minimumMs, MINUTE_MS)).flatMap(
    (within) => placeContact(context, { pass, legs, within }) ?? [],
  );
  const ways = [long, ...short].flatMap((placed) => yieldTo({ near, rest, blocker, placed }) ?? []);
  return ways.toSorted((a, b) => a.costMinutes - b.costMinutes)[0] ?? null;
}
