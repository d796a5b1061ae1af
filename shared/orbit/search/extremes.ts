import { climbOf, elevationOf } from './clearance.ts';
import { exactNode, type Search } from './exact.ts';
import { moved, type Node } from './node.ts';
import { rootBetween } from './root.ts';
import { approximateState, segmentAfter, type Run } from './run.ts';
import { highestUpKm, stateOn } from './segment.ts';

/** A highest or lowest elevation of a run. */
export interface Extreme {
  kind: 'highest' | 'lowest';
  ms: number;
  /** The same from SGP4, once it was asked for. */
  exact: Node | null;
}

/** Extremes are found to this many ms on the approximation; the exact step that follows is quadratic. */
const TIME_TOLERANCE_MS = 5;
const MOST_STEPS = 6;

/**
 * Instants at which the elevation turns, on the approximation. Between two fine nodes (22 deg of a revolution or less) it
 * turns at most once. Culminations certainly below the mask are passed over.
 */
export function elevationExtremes(run: Run): Extreme[] {
  const found: Extreme[] = [];
  for (let index = 0; index + 1 < run.nodes.length; index++) {
    const [from, to] = [run.nodes[index], run.nodes[index + 1]];
    if (!from || !to) continue;
    const [before, after] = [climbOf(from), climbOf(to)];
    if (before > 0 === after > 0) continue;
    // A culmination below the mask is nothing; a lowest point there parts two passes.
    if (before > 0 && highestUpKm(from, to) < run.limitKm) continue;
    const segment = segmentAfter(run, index);
    const ms = rootBetween(
      (at) => climbOf(stateOn(segment, at)),
      [from.atMs, to.atMs],
      [before, after],
      TIME_TOLERANCE_MS,
    );
    found.push({ kind: before > 0 ? 'highest' : 'lowest', ms, exact: null });
  }
  return found;
}

/** Rate of the climb function on the approximation, per s. */
function climbRate(run: Run, ms: number): number {
  const halfMs = 500;
  return climbOf(approximateState(run, ms + halfMs)) - climbOf(approximateState(run, ms - halfMs));
}

/**
 * The extreme from SGP4: one call as a rule, because the approximation is some milliseconds off. The rest of the way, at
 * most `reachS`, goes with the acceleration. The zero is that of the elevation rate by SGP4's velocity; for high orbits,
 * whose elevation is flat there, it may lie a few seconds off the maximum of the positions (below 1e-4 deg), and in the
 * last revolutions of a decaying orbit up to 0.03 deg.
 */
export function exactExtreme(search: Search, run: Run, extreme: Extreme): Node {
  if (extreme.exact) return extreme.exact;
  let ms = extreme.ms;
  for (let step = 1; ; step++) {
    const node = exactNode(search, run, ms);
    const seconds = -climbOf(node) / climbRate(run, ms);
    const isNear = Math.abs(seconds) <= search.reachS;
    if (isNear || step === MOST_STEPS || !Number.isFinite(seconds)) {
      const exact = isNear ? moved(node, search.frame, seconds) : node;
      return (extreme.exact = exact);
    }
    ms = Math.max(search.fromMs, Math.min(search.toMs, ms + 1000 * seconds));
  }
}

export const higher = (a: Node, b: Node): Node => (elevationOf(b) > elevationOf(a) ? b : a);
