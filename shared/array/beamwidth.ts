import { lineArrayFactor } from './array-factor.ts';
import { taperWeights, type LineTaper } from './taper.ts';
import { wavelengthM } from './wavelength.ts';

/** One axis of an array: its elements, their pitch and the taper along it. */
export interface ArrayAxis {
  elements: number;
  pitchMm: number;
  taper: LineTaper;
}

/** Pitch in wavelengths at the frequency in use. */
export const pitchInWavelengths = (pitchMm: number, frequencyMhz: number): number =>
  pitchMm / 1000 / wavelengthM(frequencyMhz);

/**
 * Half the half-power width of the main beam in direction cosine u, exact: the root of AF^2 = 1/2 to 1e-14. In u it
 * does not change with the scan angle. A single element has none: Infinity.
 */
export function halfPowerHalfWidthU(axis: ArrayAxis, frequencyMhz: number): number {
  const weights = taperWeights(axis.taper, axis.elements);
  const pitch = pitchInWavelengths(axis.pitchMm, frequencyMhz);
  if (axis.elements < 2) return Infinity;
  const excess = (u: number): number => lineArrayFactor(weights, pitch, u) ** 2 - 0.5;
  // The main beam falls monotonically to its first null, beyond half the uniform array's null distance.
  let inside = 0;
  let outside = 0.25 / (axis.elements * pitch);
  while (excess(outside) > 0) {
    inside = outside;
    outside *= 1.25;
  }
  while (outside - inside > 1e-15 + outside * 1e-14) {
    const middle = (inside + outside) / 2;
    if (excess(middle) > 0) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}

/** Half-power beamwidth (full width) in direction cosine u. */
export const halfPowerBeamwidthU = (axis: ArrayAxis, frequencyMhz: number): number =>
  2 * halfPowerHalfWidthU(axis, frequencyMhz);

/** Half-power beamwidth, rad, in the scan plane; null where its far edge leaves the visible region. Array factor only. */
export function halfPowerBeamwidthRad(
  axis: ArrayAxis,
  frequencyMhz: number,
  scanAngleRad: number,
): number | null {
  const h = halfPowerHalfWidthU(axis, frequencyMhz);
  const u0 = Math.sin(scanAngleRad);
  if (Math.abs(u0) + h > 1) return null;
  return Math.asin(u0 + h) - Math.asin(u0 - h);
}
