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

/** Index of the first number of the knot before an instant; instants outside use the nearest piece. */
function pieceBefore(track: Track, ms: number): number {
  const last = track.knots.length / NUMBERS_PER_KNOT - 2;
  const piece = Math.floor((ms - track.startMs) / track.stepMs);
  return NUMBERS_PER_KNOT * Math.max(0, Math.min(last, piece));
}

/**
 * Position and velocity at an instant by cubic Hermite interpolation between two knots. Against the full chain the
 * direction is within 0.001 deg (60 s knots, LEO: 0.0001 deg). Outside the track its first or last piece is continued,
 * which holds for a second or two only.
 */
export function stateAt(track: Track, ms: number): HorizonState {
  const { knots } = track;
  const i = pieceBefore(track, ms);
  const stepS = track.stepMs / 1000;
  const t = (ms - track.startMs) / track.stepMs - i / NUMBERS_PER_KNOT;
  const t2 = t * t;
  const [b, c, d] = [t2 * (3 - 2 * t), stepS * t * (1 - t) ** 2, stepS * t2 * (t - 1)];
  const [eb, ec, ed] = [(6 * t * (1 - t)) / stepS, (1 - t) * (1 - 3 * t), t * (3 * t - 2)];
  const along = (k: number): [number, number] => {
    const [p0, v0] = [knots[i + k] ?? NaN, knots[i + k + 3] ?? NaN];
    const [p1, v1] = [knots[i + k + 6] ?? NaN, knots[i + k + 9] ?? NaN];
    return [p0 + b * (p1 - p0) + c * v0 + d * v1, eb * (p1 - p0) + ec * v0 + ed * v1];
  };
  const [east, north, up] = [along(0), along(1), along(2)];
  return {
    eastKm: east[0],
    northKm: north[0],
    upKm: up[0],
    eastKmS: east[1],
    northKmS: north[1],
    upKmS: up[1],
  };
}

/** Azimuth, elevation, range and range rate of a state. Azimuth is computed, never interpolated. */
export function lookAnglesOf(state: HorizonState): LookAngles {
  const { eastKm, northKm, upKm } = state;
  const horizontalKm = Math.hypot(eastKm, northKm);
  const rangeKm = Math.hypot(horizontalKm, upKm);
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

/** Unit vector [east, north, up] towards the satellite at an instant; accuracy as `stateAt`. */
export function directionAt(track: Track, ms: number): Vector3 {
  const { eastKm, northKm, upKm } = stateAt(track, ms);
  const rangeKm = Math.sqrt(eastKm * eastKm + northKm * northKm + upKm * upKm);
  return [eastKm / rangeKm, northKm / rangeKm, upKm / rangeKm];
}
