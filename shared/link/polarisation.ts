import { toRadians } from '../units.ts';

export interface Ellipse {
  axialRatioDb: number;
}

/** Axial ratio that stands for linear, dB. */
export const LINEAR_AXIAL_RATIO_DB = 120;

/**
 * Loss by polarisation mismatch of two ellipses, dB, `tiltDeg` between their major axes (Balanis; Maral and Bousquet, from
 * memory; equal to Jones vectors). Worst tilt 90 deg. Circular on linear 3.01 dB.
 */
export function polarisationLossDb(
  wave: Ellipse,
  antenna: Ellipse,
  { tiltDeg, sameSense }: { tiltDeg: number; sameSense: boolean },
): number {
  const r1 = 10 ** (wave.axialRatioDb / 20);
  const r2 = (sameSense ? 1 : -1) * 10 ** (antenna.axialRatioDb / 20);
  const turned = (r1 ** 2 - 1) * (r2 ** 2 - 1) * Math.cos(2 * toRadians(tiltDeg));
  const share = (4 * r1 * r2 + turned) / ((r1 ** 2 + 1) * (r2 ** 2 + 1));
  return -10 * Math.log10(Math.max(1e-12, (1 + share) / 2));
}
