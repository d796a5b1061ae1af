import { toDegrees } from '../units.ts';

/** Axial ratio of an array, dB: 1 at broadside, 4 at 60 deg of scan, linear between (common practice). */
export const arrayAxialRatioDb = (scanAngleRad: number): number =>
  1 + (3 * Math.min(90, toDegrees(scanAngleRad))) / 60;

/** Discrimination of opposite circular senses by an axial ratio, dB: 20 log((r + 1) / (r - 1)); 1.06 dB gives 24.29. */
export function crossPolarDiscriminationDb(axialRatioDb: number): number {
  const ratio = 10 ** (axialRatioDb / 20);
  return 20 * Math.log10((ratio + 1) / (ratio - 1));
}
