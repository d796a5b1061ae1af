import type { Interval } from '../../shared/time.ts';

/** A leg that needs a channel of its group; what it takes of it, set-up and tear-down included. */
export interface Uncoloured extends Interval {
  /** The channel it had before and should keep if it can. */
  preferred: string | null;
  satelliteId: string;
}

/** One channel with what fixed contacts take of it. */
export interface Palette {
  channelId: string;
  held: Interval[];
}

/** Tries of the exhaustive numbering before it is given up. */
const MAX_TRIES = 20_000;

const isFree = (intervals: readonly Interval[], wanted: Interval): boolean =>
  intervals.every(({ fromMs, toMs }) => wanted.toMs <= fromMs || wanted.fromMs >= toMs);

/** Channels in the order in which a leg should take them: its own, the satellite's last one, the one freed last. */
function candidates(
  palettes: readonly Palette[],
  taken: ReadonlyMap<string, Interval[]>,
  lastOf: ReadonlyMap<string, string>,
  leg: Uncoloured,
): string[] {
  const freedAt = (channelId: string): number =>
    (taken.get(channelId) ?? []).reduce(
      (latest, { toMs }) => (toMs <= leg.fromMs ? Math.max(latest, toMs) : latest),
      -Infinity,
    );
  const rank = (channelId: string): number =>
    channelId === leg.preferred ? 0 : channelId === lastOf.get(leg.satelliteId) ? 1 : 2;
  return palettes
    .map(({ channelId }) => channelId)
    .filter((channelId) => isFree(taken.get(channelId) ?? [], leg))
    .sort((a, b) => rank(a) - rank(b) || freedAt(b) - freedAt(a));
}

/**
 * Gives each leg a channel, in order of time, the preferred one where it is free. With nothing fixed on the channels
 * the first try always succeeds (interval colouring); with fixed contacts in the middle it steps back and tries
 * others. null: no numbering was found.
 */
export function colourChannels(
  legs: readonly Uncoloured[],
  palettes: readonly Palette[],
): string[] | null {
  const order = [...legs.keys()].sort((a, b) => (legs[a]?.fromMs ?? 0) - (legs[b]?.fromMs ?? 0));
  const colours: string[] = legs.map(() => '');
  const taken = new Map(palettes.map(({ channelId, held }) => [channelId, [...held]]));
  const lastOf = new Map<string, string>();
  let tries = 0;
  const place = (position: number): boolean => {
    const index = order[position];
    const leg = index === undefined ? undefined : legs[index];
    if (index === undefined || !leg) return true;
    for (const channelId of candidates(palettes, taken, lastOf, leg)) {
      if (++tries > MAX_TRIES) return false;
      const own = taken.get(channelId) ?? [];
      const before = lastOf.get(leg.satelliteId);
      own.push(leg);
      lastOf.set(leg.satelliteId, channelId);
      colours[index] = channelId;
      if (place(position + 1)) return true;
      own.pop();
      if (before === undefined) lastOf.delete(leg.satelliteId);
      else lastOf.set(leg.satelliteId, before);
    }
    return false;
  };
  return place(0) ? colours : null;
}
