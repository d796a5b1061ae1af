import type { Pass } from '../../../shared/schemas/pass.ts';
import type { Interval } from '../../../shared/time.ts';

export interface PassWindow extends Interval {
  faceId: string;
  minScanLossDb: number;
  maxScanLossDb: number;
  minMarginDb: number | null;
}

/** Usable windows of a pass in one direction, in time. */
export const windowsOf = (pass: Pass, direction: 'receive' | 'transmit'): PassWindow[] =>
  pass.windows
    .filter((window) => window.direction === direction)
    .map(({ fromUtc, toUtc, faceId, minScanLossDb, maxScanLossDb, minMarginDb }) => ({
      faceId,
      minScanLossDb,
      maxScanLossDb,
      minMarginDb,
      fromMs: Date.parse(fromUtc),
      toMs: Date.parse(toUtc),
    }))
    .sort((a, b) => a.fromMs - b.fromMs);

/** Longest time one face can serve. */
export const usableMs = (pass: Pass, direction: 'receive' | 'transmit'): number => {
  const byFace = new Map<string, number>();
  for (const { faceId, fromMs, toMs } of windowsOf(pass, direction))
    byFace.set(faceId, (byFace.get(faceId) ?? 0) + toMs - fromMs);
  return Math.max(0, ...byFace.values());
};
