import { directionAt } from '../../orbit/track.ts';
import { SECOND_MS, type Interval } from '../../time.ts';
import type { PassModel } from '../model.ts';
import type { BeamWidths } from './separation.ts';

/** Common grid of all passes, so that pairs can be compared without propagating again. */
const TICK_MS = 4 * SECOND_MS;
/** Finer grid on which the crossings of a close pair are bracketed. */
const FINE_TICK_MS = 2 * SECOND_MS;
/** Allowance for the curvature of the relative motion between two ticks. */
const CURVATURE = 1.2;

/** Unit directions of a pass at multiples of the tick: three numbers each. */
export interface TickTrack {
  firstTick: number;
  directions: Float64Array;
}

export function ticksOf(pass: PassModel): TickTrack {
  const firstTick = Math.floor(pass.fromMs / TICK_MS);
  const count = Math.ceil(pass.toMs / TICK_MS) - firstTick + 1;
  const directions = new Float64Array(3 * count);
  for (let tick = 0; tick < count; tick++) {
    const ms = Math.min(pass.toMs, Math.max(pass.fromMs, (firstTick + tick) * TICK_MS));
    directions.set(directionAt(pass.track, ms), 3 * tick);
  }
  return { firstTick, directions };
}

/** Lower bound of the separation of a pair within a span, in half-power beamwidths of the u-v plane. */
export function quickSeparation(
  beam: BeamWidths,
  a: TickTrack,
  b: TickTrack,
  span: Interval,
): number {
  const first = Math.max(Math.floor(span.fromMs / TICK_MS), a.firstTick, b.firstTick);
  const last = Math.ceil(span.toMs / TICK_MS);
  const { u, v } = beam.axes;
  let least = Infinity;
  let [beforeU, beforeV, before] = [NaN, NaN, NaN];
  for (let tick = first; tick <= last; tick++) {
    const [i, j] = [3 * (tick - a.firstTick), 3 * (tick - b.firstTick)];
    const e = (a.directions[i] ?? NaN) - (b.directions[j] ?? NaN);
    const n = (a.directions[i + 1] ?? NaN) - (b.directions[j + 1] ?? NaN);
    const up = (a.directions[i + 2] ?? NaN) - (b.directions[j + 2] ?? NaN);
    const du = (e * u[0] + n * u[1] + up * u[2]) / beam.widthU;
    const dv = (e * v[0] + n * v[1] + up * v[2]) / beam.widthV;
    const apart = Math.hypot(du, dv);
    if (Number.isNaN(apart)) continue;
    const moved = Number.isNaN(before) ? 0 : Math.hypot(du - beforeU, dv - beforeV);
    const bound = Number.isNaN(before) ? apart : (apart + before - CURVATURE * moved) / 2;
    if (bound < least) least = bound;
    [beforeU, beforeV, before] = [du, dv, apart];
  }
  return least;
}

/** The ends of a span and the ticks between them. */
export function tickTimes(span: Interval): number[] {
  const times = [span.fromMs];
  const first = Math.floor(span.fromMs / FINE_TICK_MS) + 1;
  for (let tick = first; tick * FINE_TICK_MS < span.toMs; tick++) times.push(tick * FINE_TICK_MS);
  times.push(span.toMs);
  return times;
}
