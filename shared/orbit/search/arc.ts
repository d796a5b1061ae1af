import { SGP4_EARTH_RADIUS_KM, SGP4_J2, SGP4_MU } from '../earth.ts';
import type { TemeState } from '../propagation.ts';
import type { Vector3 } from '../../vector.ts';
import { arcElements, type ArcElements, type ArcFrame } from './arc-elements.ts';
import { meanStateOf, shapeOf, type MeanState } from './mean-state.ts';

/** An SGP4 state and its instant. */
export interface Anchor {
  ms: number;
  teme: TemeState;
}

/** Second-degree polynomial of the arc's own time, -1 at its beginning and 1 at its end. */
export type Parabola = readonly [constant: number, linear: number, quadratic: number];

/**
 * Up to a day of an orbit, described by three SGP4 states. At each of them the slowly varying elements are found that
 * reproduce it exactly through the short-period terms of J2; between them the elements follow parabolas. The frame turns
 * with the node's mean drift, so that the parabolas carry only what is left of it. Measured against SGP4 over a day:
 * near Earth 1 to 25 m, low decaying orbits 65 m, deep space 1 to 30 m (`arc-accuracy.test.ts`).
 */
export interface Arc {
  from: Anchor;
  to: Anchor;
  fromMs: number;
  toMs: number;
  middleMs: number;
  halfMs: number;
  frame: ArcFrame;
  /** Drift of the frame about the Earth's axis, rad/s. */
  driftRadS: number;
  axisKm: Parabola;
  h: Parabola;
  k: Parabola;
  p: Parabola;
  q: Parabola;
  longitude: Parabola;
  /** Eccentric longitudes at both ends, turns counted. */
  fromLongitude: number;
  toLongitude: number;
}

const TURN_RAD = 2 * Math.PI;

const turned = (v: Vector3, angle: number): Vector3 => {
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  return [v[0] * cos - v[1] * sin, v[0] * sin + v[1] * cos, v[2]];
};

/** Mean drift of the node by J2, rad/s (Brouwer 1959, first order). */
function nodeDrift(state: MeanState): number {
  const { parameterKm, eccentricOutward, eccentricAhead } = shapeOf(state);
  const axisKm = parameterKm / (1 - eccentricOutward ** 2 - eccentricAhead ** 2);
  const meanMotion = Math.sqrt(SGP4_MU / axisKm) / axisKm;
  return -1.5 * SGP4_J2 * (SGP4_EARTH_RADIUS_KM / parameterKm) ** 2 * meanMotion * state.normal[2];
}

const parabola = (before: number, middle: number, after: number): Parabola => [
  middle,
  (after - before) / 2,
  (before - 2 * middle + after) / 2,
];

export const valueAt = (c: Parabola, x: number): number => c[0] + x * (c[1] + x * c[2]);
export const slopeAt = (c: Parabola, x: number): number => c[1] + 2 * x * c[2];

const meanMotionOf = (elements: ArcElements): number =>
  Math.sqrt(SGP4_MU / elements.axisKm) / elements.axisKm;

/**
 * Turns to add to a longitude so that it follows from another by the mean motion. Half a day of secular drift is below
 * a tenth of a turn, so the count is certain.
 */
function turnsAfter(from: ArcElements, to: ArcElements, seconds: number): number {
  const expected = from.longitude + ((meanMotionOf(from) + meanMotionOf(to)) / 2) * seconds;
  return Math.round((expected - to.longitude) / TURN_RAD) * TURN_RAD;
}

const plusTurns = (elements: ArcElements, turns: number): ArcElements => ({
  ...elements,
  longitude: elements.longitude + turns,
  eccentricLongitude: elements.eccentricLongitude + turns,
});

/** The arc through three anchors at equal distances. */
export function makeArc(from: Anchor, middle: Anchor, to: Anchor): Arc {
  const halfMs = (to.ms - from.ms) / 2;
  const middleState = meanStateOf(middle.teme);
  const driftRadS = nodeDrift(middleState);
  const frame: ArcFrame = [middleState.outward, middleState.ahead, middleState.normal];
  const elementsOf = (anchor: Anchor, sign: -1 | 1): ArcElements => {
    const state = meanStateOf(anchor.teme);
    const angle = (-sign * driftRadS * halfMs) / 1000;
    const [outward, normal] = [turned(state.outward, angle), turned(state.normal, angle)];
    return arcElements(frame, { ...state, outward, normal });
  };
  const b = arcElements(frame, middleState);
  const first = elementsOf(from, -1);
  const last = elementsOf(to, 1);
  const a = plusTurns(first, turnsAfter(b, first, -halfMs / 1000));
  const c = plusTurns(last, turnsAfter(b, last, halfMs / 1000));
  return {
    from,
    to,
    fromMs: from.ms,
    toMs: to.ms,
    middleMs: middle.ms,
    halfMs,
    frame,
    driftRadS,
    axisKm: parabola(a.axisKm, b.axisKm, c.axisKm),
    h: parabola(a.h, b.h, c.h),
    k: parabola(a.k, b.k, c.k),
    p: parabola(a.p, b.p, c.p),
    q: parabola(a.q, b.q, c.q),
    longitude: parabola(a.longitude, b.longitude, c.longitude),
    fromLongitude: a.eccentricLongitude,
    toLongitude: c.eccentricLongitude,
  };
}
