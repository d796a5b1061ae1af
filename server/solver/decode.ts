import type { PlanContext } from '../../shared/schedule/context.ts';
import { holding } from '../../shared/schedule/holding.ts';
import type { ChannelModel, ContactModel, LegModel } from '../../shared/schedule/model.ts';
import { overlaps } from '../../shared/time.ts';
import { colourChannels, type Palette, type Uncoloured } from './colour-channels.ts';
import type { ChannelGroup } from './compile/channel-groups.ts';
import type { CompiledDay } from './compile/compile-day.ts';
import type { Option, OptionLeg } from './compile/options.ts';
import type { SolvedContact } from './planned.ts';

interface ChosenLeg {
  option: number;
  leg: OptionLeg;
}

/** Contacts whose channels (and, where times stay, identities) a plan should keep. */
export interface Before {
  current: readonly ContactModel[];
  previous: readonly ContactModel[];
}

function preferredChannel({ pass }: Option, leg: OptionLeg, before: Before): string | null {
  const known = [...before.current, ...before.previous].find(
    ({ passId, receive }) => passId === pass.id && overlaps(receive, leg),
  );
  const old = leg.group.direction === 'receive' ? known?.receive : known?.transmit;
  return old?.channelId ?? null;
}

/** Numbers for the legs of one group: kept ones first if that works out, else all in order of time. */
function colourGroup(
  group: ChannelGroup,
  legs: readonly Uncoloured[],
  heldOn: (channelId: string) => Palette['held'],
): string[] | null {
  const palettes = group.channels.map(({ id }) => ({ channelId: id, held: heldOn(id) }));
  const kept = new Map<number, string>();
  for (const [index, leg] of legs.entries()) {
    const palette = palettes.find(({ channelId }) => channelId === leg.preferred);
    if (!palette || palette.held.some((taken) => overlaps(taken, leg))) continue;
    palette.held.push(leg);
    kept.set(index, palette.channelId);
  }
  const rest = [...legs.keys()].filter((index) => !kept.has(index));
  const restLegs = rest.flatMap((index) => legs[index] ?? []);
  const colours = colourChannels(restLegs, palettes);
  if (colours) {
    for (const [position, index] of rest.entries()) kept.set(index, colours[position] ?? '');
    return legs.map((_, index) => kept.get(index) ?? '');
  }
  return colourChannels(
    legs,
    group.channels.map(({ id }) => ({ channelId: id, held: heldOn(id) })),
  );
}

/** A channel for every leg of the chosen options, by option and direction; null where some group has no numbering. */
function channelsOf(
  context: PlanContext,
  compiled: CompiledDay,
  chosen: readonly number[],
  before: Before,
): Map<string, string> | ChannelGroup {
  const legs = chosen.flatMap((option): ChosenLeg[] => {
    const { receive, transmit } = compiled.options[option] ?? {};
    return [receive, transmit].flatMap((leg) => (leg ? [{ option, leg }] : []));
  });
  const given = new Map<string, string>();
  for (const group of compiled.groups) {
    const [channel] = group.channels;
    const own = legs.filter(({ leg }) => leg.group === group);
    if (!channel || own.length === 0) continue;
    const uncoloured = own.flatMap(({ option, leg }) =>
      wantedOf(context, compiled, option, leg, channel, before),
    );
    const colours = colourGroup(group, uncoloured, compiled.fixed.heldOn);
    if (!colours) return group;
    for (const [index, { option }] of own.entries())
      given.set(`${option}|${group.direction}`, colours[index] ?? '');
  }
  return given;
}

function wantedOf(
  context: PlanContext,
  { options }: CompiledDay,
  index: number,
  leg: OptionLeg,
  channel: ChannelModel,
  before: Before,
): Uncoloured[] {
  const option = options[index];
  const satellite = option && context.satellites.get(option.pass.satelliteId);
  if (!option || !satellite) return [];
  const preferred = preferredChannel(option, leg, before);
  return [{ ...holding(leg, channel, satellite), preferred, satelliteId: satellite.id }];
}

const legModel = (leg: OptionLeg, channelId: string | undefined): LegModel => ({
  channelId: channelId ?? '',
  fromMs: leg.fromMs,
  toMs: leg.toMs,
});

/** Contacts of a current pass keep their identity, each at most once, the most overlapping first. */
function identities(
  options: readonly Option[],
  current: readonly ContactModel[],
): (ContactModel | null)[] {
  const free = new Set(current);
  const given = options.map(({ keeps }) => {
    if (keeps) free.delete(keeps);
    return keeps;
  });
  return options.map(({ pass, receive }, index) => {
    const kept = given[index];
    if (kept) return kept;
    const common = (contact: ContactModel): number =>
      Math.min(contact.receive.toMs, receive.toMs) -
      Math.max(contact.receive.fromMs, receive.fromMs);
    const same = [...free]
      .filter(({ passId }) => passId === pass.id)
      .sort((a, b) => common(b) - common(a))[0];
    if (same) free.delete(same);
    return same ?? null;
  });
}

/** The chosen options as contacts with channels; a group where the fixed contacts leave no valid numbering otherwise. */
export function decodePlan(
  context: PlanContext,
  compiled: CompiledDay,
  chosen: readonly number[],
  before: Before,
): SolvedContact[] | ChannelGroup {
  const channels = channelsOf(context, compiled, chosen, before);
  if (!(channels instanceof Map)) return channels;
  const options = chosen.flatMap((index) => compiled.options[index] ?? []);
  const known = identities(options, before.current);
  return options.map((option, position) => {
    const { pass, faceId, receive, transmit, keeps } = option;
    const key = chosen[position] ?? -1;
    return {
      id: known[position]?.id ?? null,
      passId: pass.id,
      predictionId: keeps?.predictionId ?? pass.predictionId,
      satelliteId: pass.satelliteId,
      missionId: pass.missionId,
      faceId,
      receive: legModel(receive, channels.get(`${key}|receive`)),
      transmit: transmit && legModel(transmit, channels.get(`${key}|transmit`)),
      locked: keeps?.locked ?? false,
    };
  });
}
