import { intersect, type Interval } from '../time.ts';

/** The same instants as disjoint intervals in order of time; those that touch are joined. */
export function union(intervals: readonly Interval[]): Interval[] {
  const joined: Interval[] = [];
  for (const { fromMs, toMs } of [...intervals].sort((a, b) => a.fromMs - b.fromMs)) {
    if (fromMs >= toMs) continue;
    const last = joined.at(-1);
    if (last && fromMs <= last.toMs) last.toMs = Math.max(last.toMs, toMs);
    else joined.push({ fromMs, toMs });
  }
  return joined;
}

/** What is left of an interval when others are taken out. */
export function subtract(from: Interval, taken: readonly Interval[]): Interval[] {
  const left: Interval[] = [];
  let cursor = from.fromMs;
  for (const { fromMs, toMs } of union(taken)) {
    if (toMs <= cursor || fromMs >= from.toMs) continue;
    if (fromMs > cursor) left.push({ fromMs: cursor, toMs: fromMs });
    cursor = Math.max(cursor, toMs);
  }
  if (cursor < from.toMs) left.push({ fromMs: cursor, toMs: from.toMs });
  return left;
}

/** Common parts of two sets of intervals. */
export function intersectAll(a: readonly Interval[], b: readonly Interval[]): Interval[] {
  return a.flatMap((one) => b.flatMap((other) => intersect(one, other) ?? []));
}

/** Length of a set of disjoint intervals, ms. */
export const totalMs = (intervals: readonly Interval[]): number =>
  intervals.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);

/** The interval made longer (or with a negative time shorter) at both ends. */
export const widen = ({ fromMs, toMs }: Interval, byMs: number): Interval => ({
  fromMs: fromMs - byMs,
  toMs: toMs + byMs,
});
