import { toDegrees, wrapDegrees } from '../units.ts';
import type { Vector3 } from '../vector.ts';

/**
 * A track: where the satellite is in the station's east-north-up frame, as knots of position and velocity.
 * Contract first (plans, facts, charts and exports read tracks only through these functions).
 */
export interface Track {
  /** Instant of the first knot, ms UTC (may be fractional). */
  startMs: number;
  /** Distance of the knots, ms; <= 60,000. */
  stepMs: number;
  /** Six numbers a knot: east, north, up in km, then their rates in km/s. */
  knots: number[];
}

/** Position and velocity in the station's east-north-up frame. */
export interface HorizonState {
  eastKm: number;
  northKm: number;
  upKm: number;
  eastKmS: number;
  northKmS: number;
  upKmS: number;
}

export interface LookAngles {
  /** Clockwise from true north, 0 <= a < 360. */
  azimuthDeg: number;
  /** Geometric, without refraction. */
  elevationDeg: number;
  rangeKm: number;
  /** Positive while the satellite recedes. */
  rangeRateKmS: number;
}

const NUMBERS_PER_KNOT = 6;

/** Instant of the last knot, ms UTC. */
export const trackEndMs = (track: Track): number =>
  track.startMs + (track.knots.length / NUMBERS_PER_KNOT - 1) * track.stepMs;

/** Weights of a Hermite piece: of the step between the knots and of the velocities at its two ends. */
interface Weights {
  step: number;
  before: number;
  after: number;
}

/** Index of the first number of the knot before a place given in steps; places outside use the nearest piece. */
function knotBefore(track: Track, steps: number): number {
  const last = track.knots.length / NUMBERS_PER_KNOT - 2;
  return NUMBERS_PER_KNOT * Math.max(0, Math.min(last, Math.floor(steps)));
}

const positionWeights = (t: number, stepS: number): Weights => ({
  step: t * t * (3 - 2 * t),
  before: stepS * t * (1 - t) * (1 - t),
  after: stepS * t * t * (t - 1),
});

const rateWeights = (t: number, stepS: number): Weights => ({
  step: (6 * t * (1 - t)) / stepS,
  before: (1 - t) * (1 - 3 * t),
  after: t * (3 * t - 2),
});

/** The weighted part of the piece that begins with number `i` of the knots. */
function blend(knots: readonly number[], i: number, weights: Weights): number {
  const step = (knots[i + 6] ?? NaN) - (knots[i] ?? NaN);
  const { before, after } = weights;
  return weights.step * step + before * (knots[i + 3] ?? NaN) + after * (knots[i + 9] ?? NaN);
}

/**
 * Position and velocity at an instant by cubic Hermite interpolation between two knots. Against the full chain the
 * direction is within 0.001 deg (60 s knots, LEO: 0.0001 deg). Outside the track its first or last piece is continued,
 * which holds for a second or two only.
 */
export function stateAt(track: Track, ms: number): HorizonState {
  const { knots, stepMs } = track;
  const steps = (ms - track.startMs) / stepMs;
  const i = knotBefore(track, steps);
  const [t, stepS] = [steps - i / NUMBERS_PER_KNOT, stepMs / 1000];
  const [position, rate] = [positionWeights(t, stepS), rateWeights(t, stepS)];
  return {
    eastKm: (knots[i] ?? NaN) + blend(knots, i, position),
    northKm: (knots[i + 1] ?? NaN) + blend(knots, i + 1, position),
    upKm: (knots[i + 2] ?? NaN) + blend(knots, i + 2, position),
    eastKmS: blend(knots, i, rate),
    northKmS: blend(knots, i + 1, rate),
    upKmS: blend(knots, i + 2, rate),
  };
}

/** Azimuth, elevation, range and range rate of a state. Azimuth is computed, never interpolated. */
export function lookAnglesOf(state: HorizonState): LookAngles {
  const { eastKm, northKm, upKm } = state;
  const horizontalKm = Math.sqrt(eastKm * eastKm + northKm * northKm);
  const rangeKm = Math.sqrt(horizontalKm * horizontalKm + upKm * upKm);
  const radial = eastKm * state.eastKmS + northKm * state.northKmS + upKm * state.upKmS;
  return {
    azimuthDeg: wrapDegrees(toDegrees(Math.atan2(eastKm, northKm))),
    elevationDeg: toDegrees(Math.atan2(upKm, horizontalKm)),
    rangeKm,
    rangeRateKmS: radial / rangeKm,
  };
}

/** Look angles at an instant; accuracy as `stateAt`. */
export const lookAnglesAt = (track: Track, ms: number): LookAngles =>
  lookAnglesOf(stateAt(track, ms));

/** Unit vector [east, north, up] towards the satellite at an instant; accuracy as `stateAt`. The fastest of all. */
export function directionAt(track: Track, ms: number): Vector3 {
  const { knots, stepMs } = track;
  const steps = (ms - track.startMs) / stepMs;
  const i = knotBefore(track, steps);
  const weights = positionWeights(steps - i / NUMBERS_PER_KNOT, stepMs / 1000);
  const eastKm = (knots[i] ?? NaN) + blend(knots, i, weights);
  const northKm = (knots[i + 1] ?? NaN) + blend(knots, i + 1, weights);
  const upKm = (knots[i + 2] ?? NaN) + blend(knots, i + 2, weights);
  const perKm = 1 / Math.sqrt(eastKm * eastKm + northKm * northKm + upKm * upKm);
  return [eastKm * perKm, northKm * perKm, upKm * perKm];
}
