import { MINUTE_MS } from '../time.ts';
import { requireInput } from './input-error.ts';
import { horizonFrame, type Observer } from './observer.ts';
import { makeOrbit, propagate, type ElementLines } from './propagation.ts';
import { toHorizon } from './topocentric.ts';
import type { Track } from './track.ts';

/**
 * The track of a satellite between two instants: SGP4 knots at equal distances of at most 60 s, the first and the last
 * exactly at the ends. Throws an `OrbitInputError` where the model fails inside the span.
 */
export function makeTrack(
  elements: ElementLines,
  observer: Observer,
  fromMs: number,
  toMs: number,
): Track {
  requireInput(toMs > fromMs, 'toMs', 'the end of a track must lie after its beginning.');
  const orbit = makeOrbit(elements);
  const frame = horizonFrame(observer);
  const pieces = Math.ceil((toMs - fromMs) / MINUTE_MS);
  const stepMs = (toMs - fromMs) / pieces;
  const knots: number[] = [];
  for (let knot = 0; knot <= pieces; knot++) {
    const ms = fromMs + knot * stepMs;
    const teme = propagate(orbit, ms);
    requireInput(
      teme !== null,
      'elements',
      'the orbit ends (SGP4 reports decay) inside the track.',
    );
    const state = toHorizon(teme, frame, ms);
    knots.push(state.eastKm, state.northKm, state.upKm);
    knots.push(state.eastKmS, state.northKmS, state.upKmS);
  }
  return { startMs: fromMs, stepMs, knots };
}
