import { scanAngleForLoss, type ScanLossCurve } from './scan-loss.ts';
import { wavelengthM } from './wavelength.ts';

export interface HardEndFace extends ScanLossCurve {
  hardEndDb: number;
  pitchXMm: number;
  pitchYMm: number;
}

/**
 * Scan angle, rad, at which the first grating-lobe peak enters the visible region of a rectangular lattice:
 * sin theta = lambda / d - 1 (Mailloux, Balanis). Taken for the wider pitch, which is exact in that principal plane
 * and on the safe side elsewhere; pi / 2 when none enters.
 */
export function gratingLobeOnsetRad(pitchMm: number, frequencyMhz: number): number {
  const sine = (wavelengthM(frequencyMhz) * 1000) / pitchMm - 1;
  return sine >= 1 ? Math.PI / 2 : Math.asin(Math.max(0, sine));
}

/**
 * Scan angle, rad, that no beam of the face may pass, whatever the limit of the day: the loss at the hard end, the last
 * row of the table or the grating lobe at the highest frequency in use, whichever comes first.
 */
export function hardEndAngleRad(face: HardEndFace, highestFrequencyMhz: number | null): number {
  const byLoss = scanAngleForLoss(face, face.hardEndDb);
  if (highestFrequencyMhz === null) return byLoss;
  const pitchMm = Math.max(face.pitchXMm, face.pitchYMm);
  return Math.min(byLoss, gratingLobeOnsetRad(pitchMm, highestFrequencyMhz));
}
