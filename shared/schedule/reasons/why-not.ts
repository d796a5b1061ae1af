import { intersect, overlaps, SECOND_MS, type Interval } from '../../time.ts';
import { blockedIntervals, possibleIntervals, type Blocked } from '../blocked.ts';
import { closenessWords } from '../conflict-words.ts';
import { channelLabel, faceLabel, satelliteName, type PlanContext } from '../context.ts';
import type { ChannelModel, Direction, PassModel, Rule, SatelliteModel } from '../model.ts';
import { directionWord, type PlanLeg } from '../plan-legs.ts';
import { closureWords } from '../rules/closure.ts';
import { servicesOf } from '../services.ts';
import { clock, clockSpan, spoken } from '../words.ts';
import { freePieces } from './placement.ts';

/** One rule that stops a pass, in a sentence, with the contacts, times and values involved. */
export interface PassReason {
  rule: Rule;
  message: string;
  contactIds: string[];
  fromMs: number | null;
  toMs: number | null;
  value: number | null;
  limit: number | null;
  unit: string | null;
}

export const reason = (
  rule: Rule,
  message: string,
  more: Partial<PassReason> = {},
): PassReason => ({
  rule,
  message,
  contactIds: [],
  fromMs: null,
  toMs: null,
  value: null,
  limit: null,
  unit: null,
  ...more,
});

/** A channel that would fit, the windows on it and what stands in them. */
interface Way {
  channel: ChannelModel;
  windows: Interval[];
  blocked: Blocked[];
}

function waysOf(
  context: PlanContext,
  legs: readonly PlanLeg[],
  pass: PassModel,
  satellite: SatelliteModel,
  direction: Direction,
): Way[] {
  return context.day.channels
    .filter((channel) => channel.direction === direction)
    .flatMap((channel) => {
      const candidate = { pass, satellite, channel };
      const windows = possibleIntervals(context, candidate, false);
      if (windows.length === 0) return [];
      const blocked = blockedIntervals(context, candidate, legs).filter((one) =>
        windows.some((window) => overlaps(window, one)),
      );
      return [{ channel, windows, blocked }];
    });
}

const idsOf = (blocked: readonly Blocked[]): string[] => [
  ...new Set(blocked.flatMap(({ legs }) => legs.map(({ contact }) => contact.id))),
];

const spanOf = (items: readonly Interval[]): Interval => ({
  fromMs: Math.min(...items.map(({ fromMs }) => fromMs)),
  toMs: Math.max(...items.map(({ toMs }) => toMs)),
});

/** `R1 by Teal 3 until 06:20:10`: the holder of a channel that leaves last. */
function holderWords(context: PlanContext, { channel, blocked }: Way): string {
  const last = blocked
    .filter(({ rule }) => rule === 'channel-busy')
    .flatMap(({ legs }) => legs)
    .toSorted((a, b) => b.held.toMs - a.held.toMs)[0];
  if (!last) return channel.label;
  const name = satelliteName(context, last.contact.satelliteId);
  return `${channelLabel(context, channel.id)} by ${name} until ${clock(last.held.toMs)}`;
}

/** Channels of a face that fit are all held by others at some time of the window. */
function busyReason(context: PlanContext, name: string, ways: readonly Way[]): PassReason[] {
  const busy = ways.map(({ blocked }) => blocked.filter(({ rule }) => rule === 'channel-busy'));
  const [first] = ways;
  if (!first || busy.some((list) => list.length === 0)) return [];
  const { faceId, direction } = first.channel;
  const all = busy.flat();
  const window = spanOf(ways.flatMap(({ windows }) => windows));
  const during = intersect(spanOf(all), window) ?? window;
  const holders = ways.map((way) => holderWords(context, way)).join(', ');
  const what = `${directionWord(direction)} channel`;
  const place = faceLabel(context, faceId);
  const words =
    ways.length === 1
      ? `The one ${what} of ${place} that fits ${name} is taken: ${holders}.`
      : `All ${ways.length} ${what}s of ${place} that fit ${name} are taken: ${holders}.`;
  return [
    reason('channel-busy', words, {
      contactIds: idsOf(all),
      ...during,
      value: ways.length,
      limit: ways.length,
      unit: 'channels',
    }),
  ];
}

/** Everything but busy channels, each thing said once. */
function otherReasons(context: PlanContext, name: string, ways: readonly Way[]): PassReason[] {
  const said = new Map<string, PassReason>();
  const say = (key: string, found: PassReason): void => {
    if (!said.has(key)) said.set(key, found);
  };
  for (const { channel, blocked, windows } of ways)
    for (const one of blocked) {
      const during = windows.map((window) => intersect(window, one)).find((part) => part !== null);
      if (!during) continue;
      const { rule, conflict, closure, legs } = one;
      const others = legs.map(({ contact }) => satelliteName(context, contact.satelliteId));
      const more = { contactIds: idsOf([one]), ...during };
      const key = `${rule}|${channel.faceId}|${channel.direction}|${more.contactIds.join()}|${closure?.id ?? ''}`;
      if (conflict)
        say(
          key,
          reason(
            rule,
            `On ${faceLabel(context, channel.faceId)} ${name} comes too close to ${others[0] ?? 'another'} from ${clockSpan(during)}: ${closenessWords(conflict)}.`,
            conflict.isolationDb === null
              ? {
                  ...more,
                  value: conflict.separationHpbw,
                  limit: conflict.requiredHpbw,
                  unit: 'HPBW',
                }
              : { ...more, value: conflict.isolationDb, limit: conflict.requiredDb, unit: 'dB' },
          ),
        );
      else if (closure) say(key, reason(rule, `${closureWords(context, closure)}.`, more));
      else if (rule === 'duplicate')
        say(key, reason(rule, `${name} has a contact already from ${clockSpan(during)}.`, more));
      else if (rule === 'transmit-limit') {
        const limit = context.faces.get(channel.faceId)?.transmitBeamLimit ?? 0;
        say(
          key,
          reason(
            rule,
            `All ${limit} transmit beams of ${faceLabel(context, channel.faceId)} are on from ${clockSpan(during)}: ${others.join(', ')}.`,
            { ...more, value: limit, limit, unit: 'beams' },
          ),
        );
      }
    }
  return [...said.values()];
}

/** What is left of the windows is shorter than any service of the pass needs. */
function tooShortReason(
  context: PlanContext,
  legs: readonly PlanLeg[],
  pass: PassModel,
  satellite: SatelliteModel,
  ways: readonly Way[],
): PassReason[] {
  const longestMs = Math.max(
    0,
    ...ways
      .flatMap(({ channel }) => freePieces(context, { pass, satellite, channel }, legs))
      .map(({ fromMs, toMs }) => toMs - fromMs),
  );
  const minimumMs = Math.min(...servicesOf(context.day, pass).map((service) => service.minimumMs));
  if (longestMs >= minimumMs) return [];
  const left =
    longestMs > 0
      ? `The longest downlink left for ${satellite.name} lasts ${spoken(longestMs)}`
      : `No downlink is left for ${satellite.name}`;
  return [
    reason('too-short', `${left}; its service needs ${spoken(minimumMs)}.`, {
      value: longestMs / SECOND_MS,
      limit: minimumMs / SECOND_MS,
      unit: 's',
    }),
  ];
}

/** Every rule that stops a pass with usable windows from being placed beside the given legs. */
export function whyNot(
  context: PlanContext,
  legs: readonly PlanLeg[],
  pass: PassModel,
  satellite: SatelliteModel,
): PassReason[] {
  const services = servicesOf(context.day, pass);
  const needsUplink = services.every(({ uplink }) => uplink === 'required');
  const directions: Direction[] = needsUplink ? ['receive', 'transmit'] : ['receive'];
  const found = directions.flatMap((direction) => {
    const ways = waysOf(context, legs, pass, satellite, direction);
    if (ways.length === 0)
      return [
        reason(
          'channel-unfit',
          `No ${directionWord(direction)} channel in service fits ${satellite.name} on a face that sees this pass.`,
        ),
      ];
    const faces = [...new Set(ways.map(({ channel }) => channel.faceId))];
    const perFace = faces.flatMap((faceId) => {
      const own = ways.filter(({ channel }) => channel.faceId === faceId);
      return busyReason(context, satellite.name, own);
    });
    const short =
      direction === 'receive' ? tooShortReason(context, legs, pass, satellite, ways) : [];
    return [...perFace, ...otherReasons(context, satellite.name, ways), ...short];
  });
  return found.length > 0
    ? found
    : [
        reason(
          'too-short',
          `Downlink and uplink of ${satellite.name} do not fit together long enough for its service.`,
        ),
      ];
}
