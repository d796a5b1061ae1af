import { toDegrees, toRadians } from '../units.ts';

/** Largest spacing, wavelengths, without a grating-lobe peak in sight up to a scan angle (Mailloux, Balanis; from memory). */
export const onsetSpacing = (largestScanDeg: number): number =>
  1 / (1 + Math.sin(toRadians(largestScanDeg)));

/** The same with the whole lobe of n elements kept out. */
export const lobeFreeSpacing = (largestScanDeg: number, elements: number): number =>
  (1 - 1 / elements) * onsetSpacing(largestScanDeg);

/** Directions, deg off the normal, of the grating-lobe peaks in the scan plane: u_p = u0 + p / d; growing, empty if none. */
export function gratingLobesDeg(pitch: number, scanDeg: number): number[] {
  const u0 = Math.sin(toRadians(scanDeg));
  const found: number[] = [];
  const orders = Math.ceil(2 * pitch);
  for (let order = -orders; order <= orders; order++) {
    const u = u0 + order / pitch;
    if (order !== 0 && Math.abs(u) < 1) found.push(toDegrees(Math.asin(u)));
  }
  return found;
}
