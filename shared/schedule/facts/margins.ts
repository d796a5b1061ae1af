import { SECOND_MS, type Interval } from '../../time.ts';
import { union } from '../intervals.ts';
import { reducedParts, type PassLink } from '../link-facts.ts';
import type { ClosureModel } from '../model.ts';
import { extremes, whereHolds } from './crossings.ts';

/** A part of a pass with the least link margin in it. */
export interface MarginPart extends Interval {
  minMarginDb: number;
}

/** Margins run smoothly: this distance shows every turn of theirs, and there are at most so many samples. */
const LEAST_STEP_MS = 10 * SECOND_MS;
const MOST_STEPS = 60;

const sampleTimes = ({ fromMs, toMs }: Interval): number[] => {
  const lengthMs = toMs - fromMs;
  const steps = Math.min(MOST_STEPS, Math.max(2, Math.ceil(lengthMs / LEAST_STEP_MS)));
  return Array.from({ length: steps + 1 }, (_, step) => fromMs + (step * lengthMs) / steps);
};

/** The parts of an interval in which the link margin keeps its floor, reductions counted; exact crossings. */
export function whereMarginHolds(
  link: PassLink,
  interval: Interval,
  { floorDb, reductions }: { floorDb: number; reductions: readonly ClosureModel[] },
): MarginPart[] {
  const parts = reducedParts(interval, reductions).flatMap((part) => {
    const marginAt = (ms: number): number => link.budgetAt(ms).marginDb - part.lossDb;
    const leastIn = (within: Interval): number => {
      const times = sampleTimes(within);
      return extremes(marginAt, times, times.map(marginAt)).least;
    };
    const times = sampleTimes(part);
    const holds = whereHolds((ms) => marginAt(ms) - floorDb, times);
    return holds.map((one) => ({ ...one, minMarginDb: leastIn(one) }));
  });
  return union(parts).map((whole) => {
    const inside = parts.filter(({ fromMs, toMs }) => fromMs >= whole.fromMs && toMs <= whole.toMs);
    return { ...whole, minMarginDb: Math.min(...inside.map((part) => part.minMarginDb)) };
  });
}
