import { dbToPower, powerToDb } from '../units.ts';
import { arrayFactorDb, type BeamPattern } from './array-factor.ts';
import type { FaceDirection } from './face-geometry.ts';
import { scanLossDb, type ScanLossCurve } from './scan-loss.ts';

/** Isolation, positive dB, of a pattern level (negative dB) over a floor of hardware errors: sum of powers. */
export const isolationWithFloorDb = (patternDb: number, floorDb: number): number =>
  -powerToDb(dbToPower(patternDb) + dbToPower(-Math.abs(floorDb)));

/** A beam and the element pattern it is made of. */
export interface FaceBeam extends ScanLossCurve {
  pattern: BeamPattern;
  /** Sidelobe floor, dB; its sign does not matter. -40 calibrated, -35 not (common practice). null: ideal. */
  floorDb: number | null;
}

/**
 * Gain of a beam towards another direction of its face, relative to its own peak, dB: array factor (with floor) and the
 * ratio of the element pattern, taken from the scan loss. Directions behind the face get the loss of the last row.
 */
export function relativeGainDb(
  beam: FaceBeam,
  steered: FaceDirection,
  seen: FaceDirection,
): number {
  const factorDb = arrayFactorDb(beam.pattern, seen.u - steered.u, seen.v - steered.v);
  const levelDb = beam.floorDb === null ? factorDb : -isolationWithFloorDb(factorDb, beam.floorDb);
  return levelDb + elementLossDb(beam, steered) - elementLossDb(beam, seen);
}

/** Loss beyond which the element pattern is not followed, dB. */
const DEEPEST_DB = 30;

/** Loss of the element pattern in a direction, dB, also where the scan-loss curve has ended. */
export function elementLossDb(
  curve: ScanLossCurve,
  { scanAngleRad }: { scanAngleRad: number },
): number {
  const lossDb = scanLossDb(curve, scanAngleRad) ?? curve.scanLossTable?.at(-1)?.[1] ?? DEEPEST_DB;
  return Math.min(DEEPEST_DB, lossDb);
}
