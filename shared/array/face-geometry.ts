import { toRadians } from '../units.ts';
import { add, cross, dot, norm, scale, type Vector3 } from '../vector.ts';

/** How a face stands: boresight azimuth clockwise from true north, elevation above the horizontal, roll about it. */
export interface FaceOrientation {
  boresightAzimuthDeg: number;
  boresightElevationDeg: number;
  rollDeg: number;
}

/** Unit vectors of a face in east-north-up. Left-handed on purpose: u to the right and v up as seen from the station. */
export interface FaceAxes {
  u: Vector3;
  v: Vector3;
  normal: Vector3;
}

/** A direction on a face: direction cosines, w along the normal (behind the face w <= 0), scan angle off the normal. */
export interface FaceDirection {
  u: number;
  v: number;
  w: number;
  scanAngleRad: number;
}

/**
 * Axes of a face. At roll 0 u is horizontal and points to growing azimuth, v to growing elevation; roll is positive
 * clockwise as seen from behind the face. Exact.
 */
export function faceAxes(face: FaceOrientation): FaceAxes {
  const azimuth = toRadians(face.boresightAzimuthDeg);
  const elevation = toRadians(face.boresightElevationDeg);
  const roll = toRadians(face.rollDeg);
  const [sinAz, cosAz] = [Math.sin(azimuth), Math.cos(azimuth)];
  const [sinEl, cosEl] = [Math.sin(elevation), Math.cos(elevation)];
  const u0: Vector3 = [cosAz, -sinAz, 0];
  const v0: Vector3 = [-sinEl * sinAz, -sinEl * cosAz, cosEl];
  return {
    u: add(scale(u0, Math.cos(roll)), scale(v0, -Math.sin(roll))),
    v: add(scale(u0, Math.sin(roll)), scale(v0, Math.cos(roll))),
    normal: [cosEl * sinAz, cosEl * cosAz, sinEl],
  };
}

/** A unit east-north-up direction on known axes. atan2 keeps the digits that acos loses near boresight. Exact. */
export function directionOnAxes(axes: FaceAxes, direction: Vector3): FaceDirection {
  const w = dot(direction, axes.normal);
  return {
    u: dot(direction, axes.u),
    v: dot(direction, axes.v),
    w,
    scanAngleRad: Math.atan2(norm(cross(direction, axes.normal)), w),
  };
}

/** A unit east-north-up direction on a face. For many directions keep `faceAxes` and use `directionOnAxes`. */
export const directionOnFace = (face: FaceOrientation, direction: Vector3): FaceDirection =>
  directionOnAxes(faceAxes(face), direction);

/** The direction of a point of the u-v plane in front of the face; null where u^2 + v^2 >= 1. */
export function directionFromFace(axes: FaceAxes, u: number, v: number): Vector3 | null {
  const rest = 1 - u * u - v * v;
  if (rest <= 0) return null;
  return add(add(scale(axes.u, u), scale(axes.v, v)), scale(axes.normal, Math.sqrt(rest)));
}
