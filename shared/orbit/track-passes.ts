import { maskProfile } from './horizon-mask.ts';
import { horizonFrame, type Observer } from './observer.ts';
import type { HorizonMask, PredictedPass } from './pass.ts';
import { checkMask } from './pass-query.ts';
import { elevationExtremes } from './search/extremes.ts';
import { nodeOf, type Node } from './search/node.ts';
import { approximateState, type Run } from './search/run.ts';
import { passesOfRun } from './search/run-passes.ts';
import { stateAt, type Track } from './track.ts';

/** Longest step by acceleration, s, and the error of the track's velocities, km/s: as for an orbit near Earth. */
const REACH_S = 0.5;
const VELOCITY_ERROR_KM_S = 1e-4;

/**
 * The passes above a mask inside a track that is there already: a changed horizon mask needs no propagation. AOS and LOS
 * as accurate as the track, a few ms. A pass that `startsBefore` or `endsAfter` touches the end of the track: under a
 * lowered mask it may be longer, and only a new search knows.
 */
export function passesOfTrack(
  track: Track,
  observer: Observer,
  mask: HorizonMask,
): PredictedPass[] {
  checkMask(mask);
  const frame = horizonFrame(observer);
  const nodes = Array.from({ length: track.knots.length / 6 }, (_, knot): Node => {
    const ms = track.startMs + knot * track.stepMs;
    return nodeOf(stateAt(track, ms), frame, ms);
  });
  const run: Run = { limitKm: -Infinity, nodes, segments: [] };
  const search = {
    exactAt: (ms: number): Node => nodeOf(approximateState(run, ms), frame, ms),
    frame,
    profile: maskProfile(mask),
    fromMs: nodes[0]?.atMs ?? 0,
    toMs: nodes.at(-1)?.atMs ?? 0,
    guardKm: 0,
    velocityErrorKmS: VELOCITY_ERROR_KM_S,
    reachS: REACH_S,
    violations: 0,
  };
  return passesOfRun(search, run, elevationExtremes(run));
}
