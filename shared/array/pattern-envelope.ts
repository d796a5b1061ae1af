import { lineArrayFactor, type LinePattern } from './array-factor.ts';

const BINS_A_LOBE = 8;
/** Direction cosines of two beams differ by at most this. */
const WIDEST_U = 2;

/**
 * Upper bound of a line's array factor at a distance or beyond, dB: the largest level from there to the widest distance
 * two directions can have, grating lobes included. Steps of an eighth of a lobe, never below the pattern.
 */
export function patternEnvelopeDb({ weights, pitch }: LinePattern): (distanceU: number) => number {
  const step = 1 / (weights.length * pitch) / BINS_A_LOBE;
  const count = Math.ceil(WIDEST_U / step) + 1;
  const bounds = new Float64Array(count + 1);
  let highest = 0;
  for (let bin = count; bin >= 0; bin--) {
    // Within a bin the pattern exceeds its ends by little; a fifth of a dB covers it near a peak.
    const level = Math.abs(lineArrayFactor(weights, pitch, bin * step));
    highest = Math.max(highest, level);
    bounds[bin] = Math.min(0, 20 * Math.log10(Math.max(1e-10, highest)) + 0.2);
  }
  return (distanceU) => bounds[Math.min(count, Math.floor(distanceU / step))] ?? 0;
}
