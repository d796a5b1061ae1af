import { faceAxes } from '../../shared/array/face-geometry.ts';
import { scanAngleForLoss } from '../../shared/array/scan-loss.ts';
import { maskAt, maskProfile } from '../../shared/orbit/horizon-mask.ts';
import type { Face } from '../../shared/schemas/face.ts';
import type { Station } from '../../shared/schemas/station.ts';
import { toDegrees, toRadians } from '../../shared/units.ts';
import { add, scale, type Vector3 } from '../../shared/vector.ts';
import { circlePath, directionPoint, pathThrough, polarPoint, type Point } from './polar.ts';

/** What stands on the sky sheet whatever flies over it: mask, keep-out sectors, scan-loss contours. */
export interface Contour {
  lossDb: number;
  isLimit: boolean;
  d: string;
  /** At the foot of the circle, where its value is written. */
  foot: Point;
  /** A little to the left of the foot, outside: for the words of the limit. */
  beside: Point;
}
export interface GroundLayers {
  radius: number;
  /** Ring between mask and horizon, even-odd. */
  land: string;
  maskEdge: string;
  keepOut: { label: string; d: string; middle: Point }[];
  faces: { id: string; label: string; boresight: Point; contours: Contour[] }[];
}

export type GroundStation = Pick<Station, 'horizonMask' | 'keepOutSectors'>;
export type GroundFace = Pick<
  Face,
  | 'id'
  | 'label'
  | 'boresightAzimuthDeg'
  | 'boresightElevationDeg'
  | 'rollDeg'
  | 'scanLossExponent'
  | 'scanLossTable'
  | 'normalLimitDb'
  | 'hardEndDb'
>;
export interface SkyGround {
  station: GroundStation;
  faces: readonly GroundFace[];
  /** Limit by which the sheet is shaded, dB; null: each face's own. */
  limitDb: number | null;
  at: (radius: number) => GroundLayers;
}

const circleAround = (face: GroundFace, lossDb: number): ((psiDeg: number) => Vector3) => {
  const axes = faceAxes(face);
  const angle = scanAngleForLoss(face, lossDb);
  return (psiDeg) => {
    const psi = toRadians(psiDeg);
    const across = add(scale(axes.u, Math.cos(psi)), scale(axes.v, Math.sin(psi)));
    return add(scale(axes.normal, Math.cos(angle)), scale(across, Math.sin(angle)));
  };
};

function contour(face: GroundFace, lossDb: number, isLimit: boolean, radius: number): Contour {
  const at = circleAround(face, lossDb);
  const all = Array.from({ length: 120 }, (_, i) => directionPoint(at(i * 3), radius));
  // Below the horizon the contour follows the rim.
  const points = all.map((point) => clamp(point, radius));
  const lowest = points.reduce((best, p) => (p[1] > best[1] && inside(p, radius) ? p : best), [
    0,
    -Infinity,
  ] as Point);
  const beside = points
    .filter((p) => inside(p, radius * 0.97) && p[0] < lowest[0])
    .reduce((best, p) => {
      const wanted = lowest[0] - radius * 0.3;
      return p[1] > 0 && Math.abs(p[0] - wanted) < Math.abs(best[0] - wanted) ? p : best;
    }, lowest);
  return { lossDb, isLimit, d: pathThrough(points, true), foot: lowest, beside };
}

const inside = ([x, y]: Point, radius: number): boolean => Math.hypot(x, y) < radius * 0.999;

const clamp = (point: Point, radius: number): Point => {
  const r = Math.hypot(point[0], point[1]);
  return r <= radius ? point : [(point[0] / r) * radius, (point[1] / r) * radius];
};

function maskLayers(station: GroundStation, radius: number): { land: string; maskEdge: string } {
  const profile = maskProfile(
    station.horizonMask.map(({ azimuthDeg, elevationDeg }) => [azimuthDeg, elevationDeg] as const),
  );
  const points = Array.from({ length: 181 }, (_, i) => {
    const elevation = maskAt(profile, toRadians(i * 2)).elevation;
    return polarPoint(i * 2, Math.max(0, toDegrees(elevation)), radius);
  });
  const edge = pathThrough(points, true);
  return { land: circlePath(radius) + edge, maskEdge: edge };
}

function sector(
  keepOut: GroundStation['keepOutSectors'][number],
  radius: number,
): GroundLayers['keepOut'][number] {
  const { azimuthFromDeg: from, elevationFromDeg: low, elevationToDeg: high } = keepOut;
  const width = (keepOut.azimuthToDeg - from + 360) % 360 || 360;
  const steps = Math.max(2, Math.ceil(width / 3));
  const along = (elevation: number): Point[] =>
    Array.from({ length: steps + 1 }, (_, i) =>
      polarPoint(from + (width * i) / steps, Math.max(0, elevation), radius),
    );
  return {
    label: keepOut.label,
    d: pathThrough([...along(low), ...along(high).reverse()], true),
    middle: polarPoint(from + width / 2, (Math.max(0, low) + high) / 2, radius),
  };
}

/** Whole decibels below the limit, then the limit itself. */
const lossesOf = (limitDb: number): number[] =>
  [1, 2, 3].filter((lossDb) => lossDb < limitDb - 0.15);

function layers(ground: Omit<SkyGround, 'at'>, radius: number): GroundLayers {
  const { station, faces, limitDb } = ground;
  return {
    radius,
    ...maskLayers(station, radius),
    keepOut: station.keepOutSectors.map((keepOut) => sector(keepOut, radius)),
    faces: faces.map((face) => {
      const limit = Math.min(limitDb ?? face.normalLimitDb, face.hardEndDb);
      return {
        id: face.id,
        label: face.label,
        boresight: directionPoint(faceAxes(face).normal, radius),
        contours: [
          ...lossesOf(limit).map((lossDb) => contour(face, lossDb, false, radius)),
          contour(face, limit, true, radius),
        ],
      };
    }),
  };
}

/** The ground of a station's sky; layers are made once for each radius, since many thumbnails share one. */
export function makeSkyGround(ground: Omit<SkyGround, 'at'>): SkyGround {
  const made = new Map<number, GroundLayers>();
  const at = (radius: number): GroundLayers => {
    const known = made.get(radius) ?? layers(ground, radius);
    made.set(radius, known);
    return known;
  };
  return { ...ground, at };
}
