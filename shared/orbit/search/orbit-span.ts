import { MINUTE_MS } from '../../time.ts';
import { dragFactor, failureCode, propagate, type Orbit } from '../propagation.ts';
import { SGP4_EARTH_RADIUS_KM } from '../earth.ts';
import type { Arc } from './arc.ts';

/** The part of a window in which the orbit exists, null when there is none. */
export interface OrbitSpan {
  span: { fromMs: number; toMs: number } | null;
  /** The first failure of SGP4 after the epoch, if it comes before the window's end. */
  end: { atMs: number; code: number } | null;
}

const SCAN_STEP_MS = MINUTE_MS;
/** A deep-space call costs more the further the epoch is: a scan never takes more than this many. */
const MOST_SCAN_CALLS = 20_000;
const END_TOLERANCE_MS = 1000;

/** Between an instant that works and one that fails: the last that works, to a second. */
function lastWorkingMs(orbit: Orbit, worksMs: number, failsMs: number): number {
  let [works, fails] = [worksMs, failsMs];
  while (Math.abs(fails - works) > END_TOLERANCE_MS) {
    const middle = (works + fails) / 2;
    if (propagate(orbit, middle)) works = middle;
    else fails = middle;
  }
  return works;
}

/** Walks from the epoch to an instant; where SGP4 fails for the first time, or null. */
function firstFailure(orbit: Orbit, toMs: number): { atMs: number; code: number } | null {
  const { epochMs } = orbit;
  const steps = Math.ceil(Math.abs(toMs - epochMs) / SCAN_STEP_MS);
  const count = Math.min(MOST_SCAN_CALLS, Math.max(1, steps));
  let worksMs = epochMs;
  for (let step = 0; step <= count; step++) {
    const ms = epochMs + ((toMs - epochMs) * step) / count;
    if (propagate(orbit, ms)) worksMs = ms;
    else {
      const code = failureCode(orbit);
      return { atMs: step === 0 ? epochMs : lastWorkingMs(orbit, worksMs, ms), code };
    }
  }
  return null;
}

/**
 * Where an orbit exists inside a window. SGP4 may come back with garbage after it has failed, so the walk starts at the
 * epoch and the first failure in time order ends the orbit, forwards and backwards.
 */
export function orbitSpan(orbit: Orbit, fromMs: number, toMs: number): OrbitSpan {
  const { epochMs } = orbit;
  const end = toMs > epochMs ? firstFailure(orbit, toMs) : null;
  const beginning = fromMs < epochMs ? firstFailure(orbit, fromMs) : null;
  const startMs = beginning ? Math.max(fromMs, beginning.atMs) : fromMs;
  const stopMs = end ? Math.min(toMs, end.atMs) : toMs;
  return { span: stopMs > startMs ? { fromMs: startMs, toMs: stopMs } : null, end };
}

/** A mean perigee below this height may end the orbit inside the window. */
const SAFE_PERIGEE_KM = 130;
/** Drag that changes the semi-major axis by 3 % since the epoch: decaying, or decayed and come back as garbage. */
const SAFE_DRAG = { least: 0.985, most: 1.015 };
/** Deep-space orbits change their eccentricity by the Moon and Sun: near its limits they are watched too. */
const SAFE_ECCENTRICITY = 0.9;

/** Whether arcs are of an orbit that may fail, or has failed, between the instants at which SGP4 was asked. */
export function isInDanger(orbit: Orbit, arcs: readonly Arc[]): boolean {
  const drag = dragFactor(orbit);
  if (drag < SAFE_DRAG.least || drag > SAFE_DRAG.most) return true;
  return arcs.some((arc) => {
    const eccentricity = Math.hypot(arc.h[0], arc.k[0]);
    const perigeeKm = arc.axisKm[0] * (1 - eccentricity) - SGP4_EARTH_RADIUS_KM;
    return perigeeKm < SAFE_PERIGEE_KM || eccentricity > SAFE_ECCENTRICITY;
  });
}
