import { DAY_MS } from '../../time.ts';
import { failureCode, propagate, type Orbit, type TemeState } from '../propagation.ts';
import { makeArc, valueAt, type Anchor, type Arc } from './arc.ts';
import { stateAtTime } from './arc-state.ts';

/** SGP4 gives no position: the orbit ends here or earlier. */
export class OrbitLost extends Error {
  readonly atMs: number;
  readonly code: number;

  constructor(atMs: number, code: number) {
    super(`SGP4 fails with code ${code}`);
    this.name = 'OrbitLost';
    this.atMs = atMs;
    this.code = code;
  }
}

/** SGP4 at an instant; throws `OrbitLost` where it fails. */
export function exactState(orbit: Orbit, ms: number): TemeState {
  const teme = propagate(orbit, ms);
  if (!teme) throw new OrbitLost(ms, failureCode(orbit));
  return teme;
}

/** Arcs are a day long at first: the drift of the elements over it is a parabola to within metres. */
export const LONGEST_ARC_MS = DAY_MS;
/** A larger deviation at its probe splits an arc. Measured over a day: 0.07 km at most, for low decaying orbits. */
const LARGEST_PROBE_DEVIATION_KM = 0.1;
/** Arcs are split down to a 32nd of their first length, three quarters of an hour. */
const MOST_SPLITS = 5;
/** The residual of a parabola through three points, a cubic, is largest at this time of the arc. */
const PROBE_TIME = 1 / Math.sqrt(3);
const KEPLER_TURNS = 12;

/** Eccentric longitude at a time of the arc: Kepler's equation by Newton, steps bounded for large eccentricities. */
function longitudeAt(arc: Arc, x: number): number {
  const [mean, h, k] = [valueAt(arc.longitude, x), valueAt(arc.h, x), valueAt(arc.k, x)];
  let longitude = mean;
  for (let turn = 0; turn < KEPLER_TURNS; turn++) {
    const [sin, cos] = [Math.sin(longitude), Math.cos(longitude)];
    const step = (mean - longitude - h * cos + k * sin) / (1 - k * cos - h * sin);
    longitude += Math.max(-0.9, Math.min(0.9, step));
  }
  return longitude;
}

/** Distance of an arc from SGP4 where its cubic residual is largest, km. */
function probeDeviationKm(orbit: Orbit, arc: Arc): number {
  const longitude = longitudeAt(arc, PROBE_TIME);
  const state = stateAtTime(arc, PROBE_TIME, Math.cos(longitude), Math.sin(longitude));
  const exact = exactState(orbit, state.ms);
  const [cos, sin] = [Math.cos(state.driftRad), Math.sin(state.driftRad)];
  return Math.hypot(
    state.x * cos - state.y * sin - exact.x,
    state.x * sin + state.y * cos - exact.y,
    state.z - exact.z,
  );
}

function arcsBetween(orbit: Orbit, from: Anchor, to: Anchor, splitsLeft: number): Arc[] {
  const middleMs = (from.ms + to.ms) / 2;
  const middle = { ms: middleMs, teme: exactState(orbit, middleMs) };
  const arc = makeArc(from, middle, to);
  if (splitsLeft === 0 || probeDeviationKm(orbit, arc) <= LARGEST_PROBE_DEVIATION_KM) return [arc];
  return [
    ...arcsBetween(orbit, from, middle, splitsLeft - 1),
    ...arcsBetween(orbit, middle, to, splitsLeft - 1),
  ];
}

/**
 * Arcs from one instant to another, none longer than given, each probed against SGP4 where it is worst and split where
 * it is too far off. Three SGP4 calls an arc and one for the end. Throws `OrbitLost` where SGP4 fails.
 */
export function arcsOf(orbit: Orbit, fromMs: number, toMs: number, longestMs: number): Arc[] {
  const count = Math.ceil((toMs - fromMs) / longestMs);
  const arcs: Arc[] = [];
  let from: Anchor = { ms: fromMs, teme: exactState(orbit, fromMs) };
  for (let piece = 1; piece <= count; piece++) {
    const ms = piece === count ? toMs : fromMs + ((toMs - fromMs) * piece) / count;
    const to = { ms, teme: exactState(orbit, ms) };
    arcs.push(...arcsBetween(orbit, from, to, MOST_SPLITS));
    from = to;
  }
  return arcs;
}
