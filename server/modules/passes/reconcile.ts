import type { PassWithTrack } from '../../workers/compute.worker.ts';

/** A pass as it stands, by the prediction in force. */
export interface Standing {
  passId: string;
  aosMs: number;
  losMs: number;
  tcaMs: number;
}
export interface Reconciled {
  /** The pass that each new prediction takes over; null: a new pass. */
  takes: (string | null)[];
  /** Passes that no new prediction took over. */
  left: string[];
}

const overlapMs = (a: PassWithTrack, b: Standing): number =>
  Math.min(a.losMs, b.losMs) - Math.max(a.aosMs, b.aosMs);

/**
 * Which new prediction takes over which pass of the same station and satellite (DESIGN section 5): the pass
 * whose interval it overlaps most, one to one, largest overlap first; without overlap the nearest TCA within a
 * quarter of the period; else it is a new pass.
 */
export const reconcile = (
  predicted: PassWithTrack[],
  standing: Standing[],
  periodMs: number,
): Reconciled => {
  const takes: (string | null)[] = predicted.map(() => null);
  const free = new Map(standing.map((pass) => [pass.passId, pass]));
  const pairs = predicted.flatMap((prediction, index) =>
    standing.map((pass) => ({ index, pass, rank: rankOf(prediction, pass, periodMs) })),
  );
  pairs.sort((a, b) => b.rank - a.rank);
  for (const { index, pass, rank } of pairs) {
    if (rank === -Infinity) break;
    if (takes[index] !== null || !free.has(pass.passId)) continue;
    takes[index] = pass.passId;
    free.delete(pass.passId);
  }
  return { takes, left: [...free.keys()] };
};

/** Overlaps rank by their length, near misses behind them by their distance in time. */
const rankOf = (prediction: PassWithTrack, pass: Standing, periodMs: number): number => {
  const overlap = overlapMs(prediction, pass);
  if (overlap > 0) return overlap;
  const apart = Math.abs(prediction.tcaMs - pass.tcaMs);
  return apart <= periodMs / 4 ? -apart : -Infinity;
};
