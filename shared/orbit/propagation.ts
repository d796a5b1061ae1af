/** The one file that knows satellite.js (7.1: SGP4 of AIAA 2006-6753, WGS 72, "improved" mode). */
import { sgp4, twoline2satrec, type SatRec } from 'satellite.js';
import { MINUTE_MS } from '../time.ts';
import { epochOf } from './epoch.ts';
import type { InertialState } from './topocentric.ts';

export interface ElementLines {
  line1: string;
  line2: string;
}

/** An element set made ready for SGP4; counts the calls it has cost. */
export interface Orbit {
  /** Exact epoch, ms UTC. satellite.js keeps one Julian date in a double, which is up to 20 us off. */
  readonly epochMs: number;
  readonly satrec: SatRec;
  sgp4Calls: number;
}

/** What SGP4 answers, in its TEME frame: position in km, velocity in km/s. */
export type TemeState = InertialState;

/** Prepares an element set. The lines must have been read by the element reader: nothing is checked here. */
export function makeOrbit(elements: ElementLines): Orbit {
  const satrec = twoline2satrec(elements.line1, elements.line2);
  return { epochMs: epochOf(satrec.epochyr, satrec.epochdays), satrec, sgp4Calls: 0 };
}

/**
 * TEME state at an instant, or null where SGP4 fails (see `failureCode`). After a first failure SGP4 may answer
 * plausible garbage: the first failure in time order ends the orbit (`orbit-span.ts`). One call costs 0.4 us; for deep
 * space the resonance integrator restarts at the epoch, up to 0.1 ms for a year-old epoch.
 */
export function propagate(orbit: Orbit, ms: number): TemeState | null {
  orbit.sgp4Calls += 1;
  const state = sgp4(orbit.satrec, (ms - orbit.epochMs) / MINUTE_MS);
  if (!state) return null;
  const { x, y, z } = state.position;
  const { x: vx, y: vy, z: vz } = state.velocity;
  // SGP4 can answer NaN without an error code.
  return Number.isFinite(x + y + z + vx + vy + vz) ? { x, y, z, vx, vy, vz } : null;
}

/**
 * Why the latest call failed: 1 mean eccentricity, 2 mean motion, 3 perturbed eccentricity, 4 semi-latus rectum,
 * 6 decayed (codes of AIAA 2006-6753); 0 for a position that is not a number.
 */
export const failureCode = (orbit: Orbit): number => orbit.satrec.error;

/** Square root of the factor by which drag has changed the semi-major axis since the epoch, at the latest call. */
export const dragFactor = (orbit: Orbit): number => orbit.satrec.tempa;
