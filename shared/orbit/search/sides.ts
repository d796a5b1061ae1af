import { clearanceOf } from './clearance.ts';
import type { Search } from './exact.ts';
import { exactExtreme, type Extreme } from './extremes.ts';
import type { Node } from './node.ts';
import { approximateState, firstNode, lastNode, type Run } from './run.ts';

/** An instant at which it is certain whether the satellite is above the mask. */
export interface Side {
  ms: number;
  isAbove: boolean;
  /** Exact minus approximate clearance there, km; 0 where SGP4 was not asked. */
  correctionKm: number;
}

/** The end of a run: an exact state where the search window cuts it, certainly below the mask elsewhere. */
function endSide(search: Search, node: Node): Side {
  const isCut = node.atMs === search.fromMs || node.atMs === search.toMs;
  const isAbove = isCut && clearanceOf(search.profile, node).km >= 0;
  return { ms: node.atMs, isAbove, correctionKm: 0 };
}

export const runEnds = (search: Search, run: Run): [Side, Side] => [
  endSide(search, firstNode(run)),
  endSide(search, lastNode(run)),
];

function extremeSide(search: Search, run: Run, extreme: Extreme): Side {
  const approximate = (ms: number): number =>
    clearanceOf(search.profile, approximateState(run, ms)).km;
  const km = approximate(extreme.ms);
  const isCertain = Math.abs(km) > search.guardKm;
  // A certain culmination is asked for too: it is the TCA, and it corrects AOS and LOS.
  if (isCertain && !(extreme.kind === 'highest' && km > 0))
    return { ms: extreme.ms, isAbove: km > 0, correctionKm: 0 };
  const exact = exactExtreme(search, run, extreme);
  const exactKm = clearanceOf(search.profile, exact).km;
  return {
    ms: exact.atMs,
    isAbove: exactKm >= 0,
    correctionKm: exactKm - approximate(exact.atMs),
  };
}

/** Sides under a uniform mask: between two of them the elevation is monotonic, so it crosses the mask at most once. */
export function uniformSides(search: Search, run: Run, extremes: readonly Extreme[]): Side[] {
  const [first, last] = runEnds(search, run);
  return [first, ...extremes.map((extreme) => extremeSide(search, run, extreme)), last];
}
