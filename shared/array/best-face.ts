import { toRadians } from '../units.ts';
import type { Vector3 } from '../vector.ts';
import { directionOnFace, type FaceOrientation } from './face-geometry.ts';

/** The face with the smallest scan angle to a unit direction, index from 0; null if none is within the limit. */
export function bestFace(
  faces: readonly FaceOrientation[],
  direction: Vector3,
  largestScanDeg: number,
): { index: number; scanAngleRad: number } | null {
  let best: { index: number; scanAngleRad: number } | null = null;
  for (const [index, face] of faces.entries()) {
    const { scanAngleRad } = directionOnFace(face, direction);
    if (scanAngleRad > toRadians(largestScanDeg)) continue;
    if (!best || scanAngleRad < best.scanAngleRad) best = { index, scanAngleRad };
  }
  return best;
}
