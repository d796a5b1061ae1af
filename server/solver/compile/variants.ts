import { MINUTE_MS, type Interval } from '../../../shared/time.ts';

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

/**
 * Ways to use a piece of a window: the whole of it and, on a grid, what is left when ends are trimmed. Nothing shorter
 * than the minimum.
 */
export function variants(piece: Interval, minimumMs: number, gridMs: number | null): Interval[] {
  const lengthMs = piece.toMs - piece.fromMs;
  if (lengthMs < minimumMs) return [];
  if (lengthMs > LONG_MS) return movable(piece, minimumMs);
  if (gridMs === null) return [piece];
  const steps = Math.floor((lengthMs - minimumMs) / gridMs);
  const found: Interval[] = [];
  for (let early = 0; early <= steps; early++)
    for (let late = 0; early + late <= steps; late++)
      found.push({ fromMs: piece.fromMs + early * gridMs, toMs: piece.toMs - late * gridMs });
  return found;
}
