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

type Sample = HorizonState | null | undefined;

/**
 * Velocity at a knot, km/s: the five-point difference of SGP4's positions, whose error is h^4/30 times the fifth
 * derivative (5 mm/s near Earth at 60 s, 0.1 m/s at the perigee of e = 0.7). SGP4's own velocity is up to 2.8 m/s off its
 * positions, which would bend the track by 40 m; it serves where the orbit ends and for very short steps.
 */
function ratesAt(samples: readonly Sample[], index: number, stepMs: number): number[] {
  const [a, b] = [samples[index - 2], samples[index - 1]];
  const [c, d] = [samples[index + 1], samples[index + 2]];
  const own = samples[index];
  if (stepMs < LEAST_DIFFERENCE_STEP_MS || !a || !b || !c || !d)
    return own ? [own.eastKmS, own.northKmS, own.upKmS] : [];
  const perSecond = SECOND_MS / (12 * stepMs);
  return [
    (8 * (c.eastKm - b.eastKm) - (d.eastKm - a.eastKm)) * perSecond,
    (8 * (c.northKm - b.northKm) - (d.northKm - a.northKm)) * perSecond,
    (8 * (c.upKm - b.upKm) - (d.upKm - a.upKm)) * perSecond,
  ];
}

/** As `makeTrack`, for an orbit and a frame that are there already. */
export function trackOf(orbit: Orbit, frame: HorizonFrame, fromMs: number, toMs: number): Track {
  requireInput(toMs > fromMs, 'toMs', 'the end of a track must lie after its beginning.');
  const pieces = Math.ceil((toMs - fromMs) / MINUTE_MS);
  const stepMs = (toMs - fromMs) / pieces;
  const samples: Sample[] = [];
  for (let knot = -BEYOND; knot <= pieces + BEYOND; knot++) {
    const ms = fromMs + knot * stepMs;
    const teme = propagate(orbit, ms);
    samples.push(teme && toHorizon(teme, frame, ms));
  }
  const knots: number[] = [];
  for (let index = BEYOND; index <= pieces + BEYOND; index++) {
    const state = samples[index] ?? null;
    requireInput(state !== null, 'elements', 'the orbit ends (SGP4 fails) inside the track.');
    knots.push(state.eastKm, state.northKm, state.upKm, ...ratesAt(samples, index, stepMs));
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
