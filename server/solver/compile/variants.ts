import { MINUTE_MS, SECOND_MS, type Interval } from '../../../shared/time.ts';
import type { Contention } from './contention.ts';

/** A window longer than this is served by contacts that can be moved inside it. */
export const LONG_MS = 60 * MINUTE_MS;
const MOVABLE_MS = [20 * MINUTE_MS, 40 * MINUTE_MS, 60 * MINUTE_MS];
const MOVE_STEP_MS = 15 * MINUTE_MS;

/** Contacts of 20, 40 and 60 min (never below the minimum) every 15 min of an hours-long piece, and one at its end. */
function movable(piece: Interval, minimumMs: number): Interval[] {
  const lengths = new Set(MOVABLE_MS.map((ms) => Math.max(ms, minimumMs)));
  const found: Interval[] = [];
  for (const lengthMs of lengths) {
    const lastMs = piece.toMs - lengthMs;
    for (let fromMs = piece.fromMs; fromMs < lastMs; fromMs += MOVE_STEP_MS)
      found.push({ fromMs, toMs: fromMs + lengthMs });
    if (lastMs >= piece.fromMs) found.push({ fromMs: lastMs, toMs: piece.toMs });
  }
  return found;
}

export interface TrimQuestion {
  piece: Interval;
  minimumMs: number;
  contention: Contention;
  /** What the leg holds before and after itself, ms. */
  margins: readonly [number, number];
  /** Hand-over instants lie on multiples of it; null: no trims. */
  gridMs: number | null;
}

const upToSecond = (ms: number): number => Math.ceil(ms / SECOND_MS) * SECOND_MS;
const downToSecond = (ms: number): number => Math.floor(ms / SECOND_MS) * SECOND_MS;

/** Grid instants of an interval with its ends. */
function instants({ fromMs, toMs }: Interval, gridMs: number): number[] {
  const found = [fromMs];
  for (let ms = Math.floor(fromMs / gridMs + 1) * gridMs; ms < toMs; ms += gridMs) found.push(ms);
  found.push(toMs);
  return found;
}

/**
 * Where the leg may begin and end. A channel changes hands at an instant T of the grid: one leg ends a tear-down before
 * T, the next begins a set-up after it, so nothing is lost between them. Beyond a crowd there is nobody to yield to.
 */
function ends(question: TrimQuestion, gridMs: number): { starts: number[]; stops: number[] } {
  const { piece, contention, margins } = question;
  const [before, after] = margins;
  const starts = new Set([piece.fromMs]);
  const stops = new Set([piece.toMs]);
  const offer = (startMs: number, stopMs: number): void => {
    if (startMs > piece.fromMs && startMs < piece.toMs) starts.add(startMs);
    if (stopMs > piece.fromMs && stopMs < piece.toMs) stops.add(stopMs);
  };
  for (const crowd of contention.crowds)
    for (const ms of instants(crowd, gridMs))
      offer(upToSecond(ms + before), downToSecond(ms - after));
  for (const meeting of contention.meetings)
    for (const ms of instants(meeting, gridMs)) offer(upToSecond(ms), downToSecond(ms));
  return { starts: [...starts], stops: [...stops] };
}

/** Ways to use a piece: the whole of it and what is left when ends are trimmed; nothing shorter than the minimum. */
export function variants(question: TrimQuestion): Interval[] {
  const { piece, minimumMs, gridMs } = question;
  if (piece.toMs - piece.fromMs < minimumMs) return [];
  if (piece.toMs - piece.fromMs > LONG_MS) return movable(piece, minimumMs);
  if (gridMs === null) return [piece];
  const { starts, stops } = ends(question, gridMs);
  return starts.flatMap((fromMs) =>
    stops.flatMap((toMs) => (toMs - fromMs >= minimumMs ? [{ fromMs, toMs }] : [])),
  );
}
