import { toRadians, wrapDegrees } from '../units.ts';
import type { HorizonMask } from './pass.ts';

/** A horizon mask made ready for search: knots in rad around the circle, and its lowest elevation. */
export interface MaskProfile {
  isUniform: boolean;
  lowestRad: number;
  sinLowest: number;
  cosLowest: number;
  /** Largest slope, rad of elevation per rad of azimuth. */
  steepestSlope: number;
  /** Ascending, rad in [0, 2 pi); empty for a uniform mask. */
  azimuthsRad: readonly number[];
  elevationsRad: readonly number[];
}

const TURN_RAD = 2 * Math.PI;

const uniform = (elevationDeg: number): MaskProfile => {
  const elevation = toRadians(elevationDeg);
  return {
    isUniform: true,
    lowestRad: elevation,
    sinLowest: Math.sin(elevation),
    cosLowest: Math.cos(elevation),
    steepestSlope: 0,
    azimuthsRad: [],
    elevationsRad: [],
  };
};

/** Profile of a checked mask (`pass-query.ts`). Knots that all agree make a uniform mask. */
export function maskProfile(mask: HorizonMask): MaskProfile {
  if (typeof mask === 'number') return uniform(mask);
  const first = mask[0]?.[1] ?? 0;
  if (mask.every(([, elevationDeg]) => elevationDeg === first)) return uniform(first);
  const elevationsRad = mask.map(([, elevationDeg]) => toRadians(elevationDeg));
  const slopes = mask.map(([azimuthDeg, elevationDeg], index) => {
    const [nextDeg, nextElevationDeg] = mask[(index + 1) % mask.length] ?? [0, 0];
    return Math.abs(nextElevationDeg - elevationDeg) / (wrapDegrees(nextDeg - azimuthDeg) || 360);
  });
  const lowestRad = Math.min(...elevationsRad);
  return {
    isUniform: false,
    lowestRad,
    sinLowest: Math.sin(lowestRad),
    cosLowest: Math.cos(lowestRad),
    steepestSlope: Math.max(...slopes),
    azimuthsRad: mask.map(([azimuthDeg]) => toRadians(wrapDegrees(azimuthDeg))),
    elevationsRad,
  };
}

/** Index of the knot at or before an azimuth, rad in [0, 2 pi), around north: -1 stands for the last knot. */
function knotBefore(profile: MaskProfile, azimuthRad: number): number {
  const { azimuthsRad } = profile;
  let [low, high] = [-1, azimuthsRad.length];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((azimuthsRad[middle] ?? 0) <= azimuthRad) low = middle;
    else high = middle;
  }
  return low;
}

/** Elevation of a mask at an azimuth, -pi to 2 pi, rad, and its slope there (rad of elevation per rad of azimuth). */
export function maskAt(
  profile: MaskProfile,
  azimuthRad: number,
): { elevation: number; slope: number } {
  const { azimuthsRad, elevationsRad } = profile;
  if (profile.isUniform) return { elevation: profile.lowestRad, slope: 0 };
  const azimuth = azimuthRad < 0 ? azimuthRad + TURN_RAD : azimuthRad;
  const count = azimuthsRad.length;
  const index = knotBefore(profile, azimuth);
  const [before, after] = [(index + count) % count, (index + 1) % count];
  const start = (azimuthsRad[before] ?? 0) - (index < 0 ? TURN_RAD : 0);
  const end = (azimuthsRad[after] ?? 0) + (index + 1 === count ? TURN_RAD : 0);
  const [low, high] = [elevationsRad[before] ?? 0, elevationsRad[after] ?? 0];
  const slope = (high - low) / (end - start);
  return { elevation: low + slope * (azimuth - start), slope };
}
