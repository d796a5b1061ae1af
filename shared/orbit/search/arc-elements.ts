import { dot, type Vector3 } from '../../vector.ts';
import { shapeOf, type MeanState } from './mean-state.ts';

/**
 * Equinoctial elements in the frame of an arc (Broucke and Cefola 1972): no eccentricity, inclination or node is
 * singular, because the plane of the arc is its equator.
 */
export interface ArcElements {
  axisKm: number;
  /** Eccentricity vector along the second and the first axis. */
  h: number;
  k: number;
  /** Tangent of half the tilt, along the second and (negative) the first axis. */
  p: number;
  q: number;
  /** Mean longitude, rad. */
  longitude: number;
  /** Eccentric longitude, rad, of the same turn. */
  eccentricLongitude: number;
}

/** Axes of the arc: outward, ahead and normal of its middle anchor. */
export type ArcFrame = readonly [Vector3, Vector3, Vector3];

const into = (frame: ArcFrame, v: Vector3): Vector3 => [
  dot(frame[0], v),
  dot(frame[1], v),
  dot(frame[2], v),
];

/** Elements of a mean state in an arc's frame. */
export function arcElements(frame: ArcFrame, state: MeanState): ArcElements {
  const [outward, normal] = [into(frame, state.outward), into(frame, state.normal)];
  const [p, q] = [normal[0] / (1 + normal[2]), -normal[1] / (1 + normal[2])];
  const size = 1 + p * p + q * q;
  const first: Vector3 = [(1 - p * p + q * q) / size, (2 * p * q) / size, (-2 * p) / size];
  const second: Vector3 = [(2 * p * q) / size, (1 + p * p - q * q) / size, (2 * q) / size];
  const [cos, sin] = [dot(outward, first), dot(outward, second)];
  const { parameterKm, eccentricOutward, eccentricAhead } = shapeOf(state);
  const k = eccentricOutward * cos - eccentricAhead * sin;
  const h = eccentricOutward * sin + eccentricAhead * cos;
  const betaSquared = 1 - h * h - k * k;
  const [axisKm, beta] = [parameterKm / betaSquared, Math.sqrt(betaSquared)];
  const b = 1 / (1 + beta);
  const [x, y] = [state.radiusKm * cos, state.radiusKm * sin];
  const eccentricLongitude = Math.atan2(
    h + ((1 - h * h * b) * y - h * k * b * x) / (axisKm * beta),
    k + ((1 - k * k * b) * x - h * k * b * y) / (axisKm * beta),
  );
  const equation = h * Math.cos(eccentricLongitude) - k * Math.sin(eccentricLongitude);
  return { axisKm, h, k, p, q, longitude: eccentricLongitude + equation, eccentricLongitude };
}
