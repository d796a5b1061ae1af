import { MINUTE_MS, type Interval } from '../../shared/time.ts';

export interface LoadLeg extends Interval {
  direction: 'receive' | 'transmit';
  /** Place in the list of mission colours; null: a mission that the reader does not see. */
  series: number | null;
}

/** Beams in use, minute by minute: one row of counts for each mission colour, in a fixed order. */
export interface LoadStack {
  series: number | null;
  counts: Uint8Array;
}
export interface Load {
  stacks: LoadStack[];
  total: Uint8Array;
  most: number;
  mostAtMs: number | null;
}

export const minutesOf = (span: Interval): number =>
  Math.ceil((span.toMs - span.fromMs) / MINUTE_MS);

/** Counts of one direction over a span. A minute counts a leg that touches its middle. */
export function countLoad(
  legs: readonly LoadLeg[],
  direction: LoadLeg['direction'],
  span: Interval,
): Load {
  const minutes = minutesOf(span);
  const total = new Uint8Array(minutes);
  const bySeries = new Map<number | null, Uint8Array>();
  for (const leg of legs) {
    if (leg.direction !== direction) continue;
    const counts = bySeries.get(leg.series) ?? new Uint8Array(minutes);
    bySeries.set(leg.series, counts);
    const from = Math.max(0, Math.ceil((leg.fromMs - span.fromMs) / MINUTE_MS - 0.5));
    const to = Math.min(minutes, Math.ceil((leg.toMs - span.fromMs) / MINUTE_MS - 0.5));
    for (let minute = from; minute < to; minute++) {
      counts[minute] = (counts[minute] ?? 0) + 1;
      total[minute] = (total[minute] ?? 0) + 1;
    }
  }
  const stacks = [...bySeries]
    .map(([series, counts]) => ({ series, counts }))
    .sort((a, b) => (a.series ?? 99) - (b.series ?? 99));
  let [most, at] = [0, -1];
  for (let minute = 0; minute < minutes; minute++)
    if ((total[minute] ?? 0) > most) [most, at] = [total[minute] ?? 0, minute];
  return { stacks, total, most, mostAtMs: at < 0 ? null : span.fromMs + at * MINUTE_MS };
}

/** Open channels, minute by minute. */
export function capacityOf(
  channels: readonly { closed: readonly Interval[] }[],
  span: Interval,
): Uint8Array {
  const minutes = minutesOf(span);
  const open = new Uint8Array(minutes);
  for (const { closed } of channels)
    for (let minute = 0; minute < minutes; minute++) {
      const middle = span.fromMs + (minute + 0.5) * MINUTE_MS;
      const isClosed = closed.some(({ fromMs, toMs }) => fromMs <= middle && middle < toMs);
      if (!isClosed) open[minute] = (open[minute] ?? 0) + 1;
    }
  return open;
}

export interface Stretch {
  from: number;
  to: number;
}
/** Stretches of minutes in which every open channel is in use. */
export function fullStretches(total: Uint8Array, capacity: Uint8Array): Stretch[] {
  const stretches: Stretch[] = [];
  for (let minute = 0; minute < total.length; minute++) {
    const used = total[minute] ?? 0;
    if (used === 0 || used < (capacity[minute] ?? 0)) continue;
    const last = stretches.at(-1);
    if (last && last.to >= minute - 2) last.to = minute + 1;
    else stretches.push({ from: minute, to: minute + 1 });
  }
  return stretches;
}

/** Runs of equal value, for step lines and hatches. */
export function runsOf(values: Uint8Array): (Stretch & { value: number })[] {
  const runs: (Stretch & { value: number })[] = [];
  for (const [minute, value] of values.entries()) {
    const last = runs.at(-1);
    if (last?.value === value) last.to = minute + 1;
    else runs.push({ from: minute, to: minute + 1, value });
  }
  return runs;
}
