import type { Interval } from '../../time.ts';

/** Crossings are found to this many ms, on the side where the condition holds. */
const TIME_TOLERANCE_MS = 0.02;

/** A condition that holds where its continuous value is >= 0. */
export type Condition = (ms: number) => number;

/** The crossing between an instant where the condition holds and one where it does not, on the holding side. */
function crossing(condition: Condition, holdsMs: number, failsMs: number): number {
  let [holds, fails] = [holdsMs, failsMs];
  while (Math.abs(fails - holds) > TIME_TOLERANCE_MS) {
    const middle = (holds + fails) / 2;
    if (condition(middle) >= 0) holds = middle;
    else fails = middle;
  }
  return holds;
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** The instant of the largest value of `sign * condition` between two instants (golden section, one peak inside). */
function peak(condition: Condition, sign: 1 | -1, fromMs: number, toMs: number): number {
  let [a, b] = [fromMs, toMs];
  let [c, d] = [b - GOLDEN * (b - a), a + GOLDEN * (b - a)];
  let [atC, atD] = [sign * condition(c), sign * condition(d)];
  while (b - a > TIME_TOLERANCE_MS) {
    if (atC >= atD) {
      [b, d, atD] = [d, c, atC];
      c = b - GOLDEN * (b - a);
      atC = sign * condition(c);
    } else {
      [a, c, atC] = [c, d, atD];
      d = a + GOLDEN * (b - a);
      atD = sign * condition(d);
    }
  }
  return (a + b) / 2;
}

/** Instants and values with the turning points added that might cross zero between two samples. */
function withTurningPoints(
  condition: Condition,
  times: readonly number[],
  values: readonly number[],
): [number, number][] {
  const points = times.map((ms, index): [number, number] => [ms, values[index] ?? NaN]);
  const all: [number, number][] = [];
  for (const [index, point] of points.entries()) {
    const [before, after] = [points[index - 1], points[index + 1]];
    all.push(point);
    if (!before || !after) continue;
    const sign = point[1] < 0 ? 1 : -1;
    const reach = Math.max(Math.abs(point[1] - before[1]), Math.abs(point[1] - after[1]));
    const turns = sign * (point[1] - before[1]) >= 0 && sign * (point[1] - after[1]) >= 0;
    if (!turns || Math.abs(point[1]) > reach) continue;
    const ms = peak(condition, sign, before[0], after[0]);
    all.push([ms, condition(ms)]);
  }
  return all.sort((a, b) => a[0] - b[0]);
}

/**
 * The intervals in which a continuous condition holds, between the first and the last of the given instants; ends to
 * 0.02 ms. The instants must be close enough that the value turns at most once between three of them. Values at the
 * instants may be given where they are known.
 */
export function whereHolds(
  condition: Condition,
  times: readonly number[],
  values: readonly number[] = times.map(condition),
): Interval[] {
  const found: Interval[] = [];
  let openedMs: number | null = null;
  let previous: [number, number] | null = null;
  for (const point of withTurningPoints(condition, times, values)) {
    const holds = point[1] >= 0;
    if (holds && openedMs === null)
      openedMs = previous ? crossing(condition, point[0], previous[0]) : point[0];
    if (!holds && openedMs !== null && previous) {
      found.push({ fromMs: openedMs, toMs: crossing(condition, previous[0], point[0]) });
      openedMs = null;
    }
    previous = point;
  }
  if (openedMs !== null && previous) found.push({ fromMs: openedMs, toMs: previous[0] });
  return found.filter(({ fromMs, toMs }) => toMs > fromMs);
}

/** Smallest and largest value from the first to the last instant, the turning point next to each sample refined. */
export function extremes(
  value: Condition,
  times: readonly number[],
  values: readonly number[],
): { least: number; most: number } {
  const refined = (sign: 1 | -1): number => {
    let best = 0;
    for (let index = 1; index < values.length; index++)
      if (sign * (values[index] ?? 0) > sign * (values[best] ?? 0)) best = index;
    const at = values[best] ?? NaN;
    const [fromMs, toMs] = [times[best - 1], times[best + 1]];
    if (fromMs === undefined || toMs === undefined) return at;
    const turned = value(peak(value, sign, fromMs, toMs));
    return sign * turned > sign * at ? turned : at;
  };
  return { least: refined(-1), most: refined(1) };
}
