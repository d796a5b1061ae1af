import { toDegrees, toRadians, wrapDegrees } from '../units.ts';
import type { Vector3 } from '../vector.ts';

/** Unit east-north-up vector of an azimuth (clockwise from true north) and an elevation, deg. Exact, no refraction. */
export function directionOf(azimuthDeg: number, elevationDeg: number): Vector3 {
  const [azimuth, elevation] = [toRadians(azimuthDeg), toRadians(elevationDeg)];
  const flat = Math.cos(elevation);
  return [flat * Math.sin(azimuth), flat * Math.cos(azimuth), Math.sin(elevation)];
}

/** Azimuth 0 <= a < 360 and elevation, deg, of an east-north-up vector of any length; at the zenith azimuth means nothing. */
export const anglesOf = (vector: Vector3): { azimuthDeg: number; elevationDeg: number } => ({
  azimuthDeg: wrapDegrees(toDegrees(Math.atan2(vector[0], vector[1]))),
  elevationDeg: toDegrees(Math.atan2(vector[2], Math.hypot(vector[0], vector[1]))),
});
