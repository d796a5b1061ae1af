import { directionAt } from '../../orbit/track.ts';
import { SECOND_MS, type Interval } from '../../time.ts';
import { toRadians } from '../../units.ts';
import { angleBetween, type Vector3 } from '../../vector.ts';
import { whereHolds } from './crossings.ts';
import type { PassModel } from '../model.ts';

/** Between two samples the satellite moves this far at most: finer than any mask or face edge turns. */
const STEP_RAD = toRadians(0.5);
/** Near the zenith azimuth runs much faster than the direction moves. */
const STEEP_UP = Math.sin(toRadians(70));
const SPAN_MS = 20 * SECOND_MS;

/**
 * Instants at which a pass is sampled for its crossings, AOS and LOS included: never further apart than half a degree
 * of motion, 20 s, or 1 s above 70 deg of elevation.
 */
function sampleTimes(pass: PassModel): number[] {
  const times: number[] = [];
  const spans = Math.max(1, Math.ceil((pass.toMs - pass.fromMs) / SPAN_MS));
  const spanMs = (pass.toMs - pass.fromMs) / spans;
  for (let span = 0; span < spans; span++) {
    const fromMs = pass.fromMs + span * spanMs;
    const [before, after] = [
      directionAt(pass.track, fromMs),
      directionAt(pass.track, fromMs + spanMs),
    ];
    const steep = Math.max(before[2], after[2]) > STEEP_UP;
    const byMotion = Math.ceil(angleBetween(before, after) / STEP_RAD);
    const steps = Math.max(1, steep ? Math.ceil(spanMs / SECOND_MS) : byMotion);
    for (let step = 0; step < steps; step++) times.push(fromMs + (step * spanMs) / steps);
  }
  times.push(pass.toMs);
  return times;
}

/** A pass with its directions at the sample times, so that many conditions share one propagation. */
export interface SampledPass {
  pass: PassModel;
  times: readonly number[];
  directions: readonly Vector3[];
}

export function samplePass(pass: PassModel): SampledPass {
  const times = sampleTimes(pass);
  return { pass, times, directions: times.map((ms) => directionAt(pass.track, ms)) };
}

/** A value read off a direction; a condition on it holds where the value is >= 0. */
export type Reading = (direction: Vector3) => number;

/** The parts of a pass in which a condition on the direction holds. Exact crossings. */
export const whereDirectionHolds = (
  reading: Reading,
  { pass, times, directions }: SampledPass,
): Interval[] =>
  whereHolds((ms) => reading(directionAt(pass.track, ms)), times, directions.map(reading));
