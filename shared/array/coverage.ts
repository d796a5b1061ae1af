import { toDegrees, toRadians, wrapDegrees } from '../units.ts';

/** Where a face looks; its roll does not change what it covers. */
export interface Boresight {
  azimuthDeg: number;
  elevationDeg: number;
}

/** Half-width in azimuth, deg, of a face's cover at an elevation: 0 none, 180 all around. Exact, flat horizon. */
export function azimuthHalfWidthDeg(
  boresightElevationDeg: number,
  largestScanDeg: number,
  elevationDeg: number,
): number {
  const [el0, el] = [toRadians(boresightElevationDeg), toRadians(elevationDeg)];
  const above = Math.cos(toRadians(largestScanDeg)) - Math.sin(el) * Math.sin(el0);
  const flat = Math.cos(el) * Math.cos(el0);
  if (above >= flat) return 0;
  if (above <= -flat) return 180;
  return toDegrees(Math.acos(above / flat));
}

/** Covered share of all azimuths at an elevation, by any of the faces. */
function coveredShare(
  faces: readonly Boresight[],
  largestScanDeg: number,
  elevationDeg: number,
): number {
  const spans: [number, number][] = [];
  for (const face of faces) {
    const half = azimuthHalfWidthDeg(face.elevationDeg, largestScanDeg, elevationDeg);
    if (half >= 180) return 1;
    if (half === 0) continue;
    const from = wrapDegrees(face.azimuthDeg - half);
    spans.push([from, Math.min(360, from + 2 * half)]);
    if (from + 2 * half > 360) spans.push([0, from + 2 * half - 360]);
  }
  let [covered, reached] = [0, 0];
  for (const [from, to] of spans.sort((a, b) => a[0] - b[0])) {
    covered += Math.max(0, to - Math.max(from, reached));
    reached = Math.max(reached, to);
  }
  return covered / 360;
}

const RINGS = 4000;

/** Mean of the covered share over rings of elevation, each with a weight. */
function weightedShare(
  faces: readonly Boresight[],
  largestScanDeg: number,
  floorDeg: number,
  weight: (elevationRad: number) => number,
): number {
  const lowest = Math.sin(toRadians(floorDeg));
  let [covered, whole] = [0, 0];
  for (let ring = 0; ring < RINGS; ring++) {
    const elevation = Math.asin(lowest + ((ring + 0.5) / RINGS) * (1 - lowest));
    const w = weight(elevation);
    covered += w * coveredShare(faces, largestScanDeg, toDegrees(elevation));
    whole += w;
  }
  return covered / whole;
}

/** Share of the sky above a floor, by solid angle, that the faces together reach. Within 0.0003, flat horizon. */
export const skyCoverage = (
  faces: readonly Boresight[],
  largestScanDeg: number,
  floorDeg: number,
): number => weightedShare(faces, largestScanDeg, floorDeg, () => 1);

/** Radius of the sphere used here, km. */
const EARTH_KM = 6378.137;

/**
 * Share of satellites spread evenly over a shell, and above the floor, that the faces reach. A direction counts with
 * d^2 / cos(nadir angle): a shell crowds at low elevations, so this is far below the share of the sky.
 */
export const shellCoverage = (
  faces: readonly Boresight[],
  largestScanDeg: number,
  shell: { floorDeg: number; altitudeKm: number },
): number => {
  const radius = EARTH_KM + shell.altitudeKm;
  return weightedShare(faces, largestScanDeg, shell.floorDeg, (elevation) => {
    const foot = EARTH_KM * Math.cos(elevation);
    const rangeKm = Math.sqrt(radius ** 2 - foot ** 2) - EARTH_KM * Math.sin(elevation);
    return rangeKm ** 2 / Math.sqrt(1 - (foot / radius) ** 2);
  });
};

/** Lowest and highest elevation, deg, a face reaches at an azimuth, within floor and zenith; null if none. Exact. */
export function reachableElevations(
  face: Boresight,
  largestScanDeg: number,
  look: { azimuthDeg: number; floorDeg: number },
): [number, number] | null {
  const el0 = toRadians(face.elevationDeg);
  const up = Math.sin(el0);
  const along = Math.cos(el0) * Math.cos(toRadians(look.azimuthDeg - face.azimuthDeg));
  const reach = Math.cos(toRadians(largestScanDeg)) / Math.hypot(up, along);
  if (reach > 1) return null;
  const centreDeg = toDegrees(Math.atan2(up, along));
  const halfDeg = toDegrees(Math.acos(reach));
  const lowest = Math.max(look.floorDeg, centreDeg - halfDeg);
  const highest = Math.min(90, centreDeg + halfDeg);
  return lowest <= highest ? [lowest, highest] : null;
}
