import { SECOND_MS, type Interval } from '../time.ts';
import { maskProfile } from './horizon-mask.ts';
import { horizonFrame } from './observer.ts';
import { checkOrbit } from './orbit-checks.ts';
import type { PassQuery, PassSearchResult, PredictedPass } from './pass.ts';
import { checkPassQuery } from './pass-query.ts';
import { makeOrbit, type Orbit } from './propagation.ts';
import { boundsOf } from './search/approximation-bounds.ts';
import { arcsOf, exactState, LONGEST_ARC_MS, OrbitLost } from './search/arcs.ts';
import { elevationExtremes } from './search/extremes.ts';
import { inertialNode, type Node } from './search/node.ts';
import { isInDanger, orbitSpan } from './search/orbit-span.ts';
import { passesOfRun } from './search/run-passes.ts';
import { sweep } from './search/sweep.ts';

export type { HorizonMask, PassQuery, PassSearchResult, PredictedPass } from './pass.ts';

/** Where an exact state lies outside the guard the arcs are made half as long, at most this often. */
const MOST_HALVINGS = 5;

interface Attempt {
  passes: PredictedPass[];
  guardViolations: number;
}

/** Searches a span with arcs of a length. Throws `OrbitLost` where SGP4 fails, or may fail in a span not yet walked. */
function attempt(
  orbit: Orbit,
  query: PassQuery,
  { fromMs, toMs, isWalked }: Interval & { isWalked: boolean },
  longestArcMs: number,
): Attempt {
  const arcs = arcsOf(orbit, fromMs, toMs, longestArcMs);
  const [first] = arcs;
  if (!first) return { passes: [], guardViolations: 0 };
  if (!isWalked && isInDanger(orbit, arcs)) throw new OrbitLost(toMs, 0);
  const frame = horizonFrame(query.observer);
  const profile = maskProfile(query.mask);
  const exactAt = (ms: number): Node => inertialNode(exactState(orbit, ms), frame, ms);
  const search = {
    exactAt,
    frame,
    profile,
    fromMs,
    toMs,
    ...boundsOf(first, isWalked),
    violations: 0,
  };
  const passes = sweep(arcs, frame, profile).flatMap((run) =>
    passesOfRun(search, run, elevationExtremes(run)),
  );
  return { passes, guardViolations: search.violations };
}

/** Halves the arcs until no exact state lies outside the guard. */
function refined(orbit: Orbit, query: PassQuery, span: Interval & { isWalked: boolean }): Attempt {
  let guardViolations = 0;
  for (let halvings = 0; ; halvings++) {
    const found = attempt(orbit, query, span, LONGEST_ARC_MS / 2 ** halvings);
    guardViolations += found.guardViolations;
    if (found.guardViolations === 0 || halvings === MOST_HALVINGS)
      return { passes: found.passes, guardViolations };
  }
}

/**
 * Searches an orbit that ends, or may end, inside the window: SGP4 is walked from the epoch on first. A failure between
 * two steps of the walk ends the orbit there.
 */
function searchWalked(orbit: Orbit, query: PassQuery): Omit<PassSearchResult, 'sgp4Calls'> {
  let { span, end } = orbitSpan(orbit, query.fromMs, query.toMs);
  while (span) {
    try {
      return { ...refined(orbit, query, { ...span, isWalked: true }), orbitEnd: end };
    } catch (error) {
      if (!(error instanceof OrbitLost)) throw error;
      end = { atMs: error.atMs, code: error.code };
      const toMs: number = Math.min(span.toMs, error.atMs) - SECOND_MS;
      span = toMs > span.fromMs ? { fromMs: span.fromMs, toMs } : null;
    }
  }
  return { passes: [], guardViolations: 0, orbitEnd: end };
}

/**
 * Finds every pass of a satellite over an observer in a window: all times in which the elevation is at least that of the
 * mask, cut at the window's ends.
 *
 * Method. A day of the orbit is carried by three SGP4 states (an *arc*, `search/arc.ts`): parabolas of the elements that
 * reproduce them through the short-period J2 terms stay within metres of SGP4. Four to 32 nodes a revolution are taken
 * from the arc, and the Bernstein hull of the quintic between them rules out most of the time (`search/sweep.ts`); what
 * is left is looked at with four times as many nodes. Elevation extremes and mask crossings found there are settled by
 * SGP4 itself, one call each: AOS, TCA and LOS of a pass.
 *
 * Certificate. Every arc is probed where its residual is largest, and every exact state is compared with the
 * approximation; one outside the guard (`search/approximation-bounds.ts`, at least four times the largest error measured)
 * has the arcs halved and the search repeated, and is counted. Culminations within the guard of the mask are decided by
 * SGP4. The guard is measured, not proved: `tests/accuracy` holds the search against a dense scan.
 *
 * Accuracy. AOS and LOS within 1 ms of SGP4's own, TCA within 5 ms for low orbits. Geometric directions, UT1 - UTC as
 * given by the observer, no polar motion, refraction or light time. Cost: 3 calls a pass and 3 to 4 a day.
 *
 * Throws `OrbitInputError`, naming the field, for a window, observer, mask or orbit that cannot be used.
 */
export function searchPasses(query: PassQuery): PassSearchResult {
  checkPassQuery(query);
  const { fromMs, toMs } = query;
  const orbit = makeOrbit(query.elements);
  checkOrbit(orbit, fromMs, toMs);
  try {
    const found = refined(orbit, query, { fromMs, toMs, isWalked: false });
    return { ...found, orbitEnd: null, sgp4Calls: orbit.sgp4Calls };
  } catch (error) {
    if (!(error instanceof OrbitLost)) throw error;
    return { ...searchWalked(orbit, query), sgp4Calls: orbit.sgp4Calls };
  }
}
