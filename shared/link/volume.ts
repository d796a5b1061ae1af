import { bestMode, type CodingMode } from './coding.ts';

/** Data of a contact at one rate, Gbit: what is left of its time after set-up and tear-down. */
export const constantRateVolumeGbit = (
  rate: { bitRateBps: number; frameEfficiency: number },
  time: { durationS: number; setUpS: number; tearDownS: number },
): number =>
  (rate.bitRateBps *
    Math.max(0, time.durationS - time.setUpS - time.tearDownS) *
    rate.frameEfficiency) /
  1e9;

export interface EsN0Sample {
  seconds: number;
  esN0Db: number;
}

/** Data with variable coding, Gbit: each sample's mode holds until the next; the last sample only closes the interval. */
export function variableCodingVolume(
  samples: readonly EsN0Sample[],
  { symbolRate, marginDb }: { symbolRate: number; marginDb: number },
): { modes: (CodingMode | null)[]; volumeGbit: number } {
  const modes: (CodingMode | null)[] = [];
  let bits = 0;
  for (const [index, sample] of samples.entries()) {
    const next = samples[index + 1];
    if (!next) break;
    const mode = bestMode(sample.esN0Db, marginDb);
    modes.push(mode);
    bits += symbolRate * (mode?.bitPerSymbol ?? 0) * (next.seconds - sample.seconds);
  }
  return { modes, volumeGbit: bits / 1e9 };
}
