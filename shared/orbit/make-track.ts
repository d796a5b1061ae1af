import { MINUTE_MS, SECOND_MS } from '../time.ts';
import { requireInput } from './input-error.ts';
import { horizonFrame, type HorizonFrame, type Observer } from './observer.ts';
import { makeOrbit, propagate, type ElementLines, type Orbit } from './propagation.ts';
import { toHorizon } from './topocentric.ts';
import type { HorizonState, Track } from './track.ts';

/** Differences over shorter steps would drown in the rounding of time. */
const LEAST_DIFFERENCE_STEP_MS = SECOND_MS;
/** Knots beyond each end that the five-point difference needs. */
const BEYOND = 2;

type Axis = 'eastKm' | 'northKm' | 'upKm';

/**
 * Velocity at a knot, km/s: the five-point difference of SGP4's positions (error h^4 r'''''/30: 5 mm/s near Earth at 60 s,
 * 0.1 m/s at the perigee of e = 0.7). SGP4's own velocity is up to 2.8 m/s off its positions, which would bend the
 * track by 40 m; it serves where the orbit ends and for very short steps.
 */
function rateAt(
  states: readonly (HorizonState | null)[],
  index: number,
  stepMs: number,
  axis: Axis,
): number {
  const [a, b, c, d] = [-2, -1, 1, 2].map((offset) => states[index + offset]?.[axis]);
  const own = states[index]?.[`${axis}S`] ?? NaN;
  if (stepMs < LEAST_DIFFERENCE_STEP_MS) return own;
  if (a === undefined || b === undefined || c === undefined || d === undefined) return own;
  return (8 * (c - b) - (d - a)) / ((12 * stepMs) / SECOND_MS);
}

/** As `makeTrack`, for an orbit and a frame that are there already. */
export function trackOf(orbit: Orbit, frame: HorizonFrame, fromMs: number, toMs: number): Track {
  requireInput(toMs > fromMs, 'toMs', 'the end of a track must lie after its beginning.');
  const pieces = Math.ceil((toMs - fromMs) / MINUTE_MS);
  const stepMs = (toMs - fromMs) / pieces;
  const states: (HorizonState | null)[] = [];
  for (let knot = -BEYOND; knot <= pieces + BEYOND; knot++) {
    const ms = fromMs + knot * stepMs;
    const teme = propagate(orbit, ms);
    states.push(teme && toHorizon(teme, frame, ms));
  }
  const knots: number[] = [];
  for (let index = BEYOND; index <= pieces + BEYOND; index++) {
    const state = states[index];
    const isThere = state !== null && state !== undefined;
    requireInput(isThere, 'elements', 'SGP4 gives no position inside the track: the orbit ends.');
    knots.push(state.eastKm, state.northKm, state.upKm);
    for (const axis of ['eastKm', 'northKm', 'upKm'] as const)
      knots.push(rateAt(states, index, stepMs, axis));
  }
  return { startMs: fromMs, stepMs, knots };
}

/**
 * The track of a satellite between two instants: SGP4 knots at equal distances of at most 60 s, the first and the last
 * exactly at the ends. Throws an `OrbitInputError` where the model fails inside the span.
 */
export const makeTrack = (
  elements: ElementLines,
  observer: Observer,
  fromMs: number,
  toMs: number,
): Track => trackOf(makeOrbit(elements), horizonFrame(observer), fromMs, toMs);
