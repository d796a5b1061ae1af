import { clearanceOf, type Clearance } from './clearance.ts';
import { exactNode, type Search } from './exact.ts';
import { moved, type Node } from './node.ts';
import { rootBetween } from './root.ts';
import { approximateState, segmentIndexAt, type Run } from './run.ts';

/** Instants on both sides of a crossing of the mask. */
export interface Bracket {
  belowMs: number;
  aboveMs: number;
  /** How much higher above the mask SGP4 was than the approximation at the nearest exact state, km. */
  correctionKm: number;
}

/** On the approximation to this many ms. */
const GUESS_TOLERANCE_MS = 0.5;
/** AOS and LOS are left uncertain by no more than this, s. */
const TIME_TOLERANCE_S = 0.0002;
/** A secant through two exact states has no velocity error: its steps end well inside the tolerance. */
const SECANT_REACH_S = 0.02;
const MOST_STEPS = 12;

const clearanceAt = (search: Search, run: Run, ms: number): Clearance =>
  clearanceOf(search.profile, approximateState(run, ms));

/** Narrows a bracket to the fine segment in which the corrected clearance changes its sign. */
function segmentBracket(search: Search, run: Run, bracket: Bracket): [number, number] {
  const direction = bracket.aboveMs > bracket.belowMs ? 1 : -1;
  let index = segmentIndexAt(run, bracket.aboveMs) + (direction > 0 ? 0 : 1);
  let aboveMs = bracket.aboveMs;
  for (;;) {
    const node = run.nodes[index];
    if (!node || (node.atMs - bracket.belowMs) * direction <= 0) return [bracket.belowMs, aboveMs];
    const { km } = clearanceOf(search.profile, node);
    if (km + bracket.correctionKm < 0) return [node.atMs, aboveMs];
    aboveMs = node.atMs;
    index -= direction;
  }
}

function guessMs(search: Search, run: Run, bracket: Bracket): number {
  const value = (ms: number): number => clearanceAt(search, run, ms).km + bracket.correctionKm;
  const [belowMs, aboveMs] = segmentBracket(search, run, bracket);
  const [below, above] = [value(belowMs), value(aboveMs)];
  if (below >= 0) return belowMs;
  if (above <= 0) return aboveMs;
  return rootBetween(value, [belowMs, aboveMs], [below, above], GUESS_TOLERANCE_MS);
}

/** Bend of the clearance on the approximation, km/s^2. */
function bendOf(search: Search, run: Run, ms: number): number {
  const halfMs = 500;
  return clearanceAt(search, run, ms + halfMs).kmS - clearanceAt(search, run, ms - halfMs).kmS;
}

/** Seconds to the nearer zero of value + slope t + bend t^2 / 2, or to its vertex when it has none. */
function secondsToZero(value: number, slope: number, bend: number): number {
  const discriminant = slope * slope - 2 * value * bend;
  if (discriminant < 0) return -slope / bend;
  return (-2 * value) / (slope + Math.sign(slope || 1) * Math.sqrt(discriminant));
}

/**
 * The crossing from SGP4: one call as a rule. A first step with SGP4's velocity is trusted as far as that velocity is;
 * later steps use the secant through two exact positions.
 */
export function exactCrossing(search: Search, run: Run, bracket: Bracket): Node {
  const [leastMs, mostMs] = [
    Math.min(bracket.belowMs, bracket.aboveMs),
    Math.max(bracket.belowMs, bracket.aboveMs),
  ];
  let ms = guessMs(search, run, bracket);
  const bend = bendOf(search, run, ms);
  let last: { ms: number; km: number } | null = null;
  for (let step = 1; ; step++) {
    const node = exactNode(search, run, ms);
    const { km, kmS } = clearanceOf(search.profile, node);
    const sinceS: number = last ? (ms - last.ms) / 1000 : 0;
    const slope: number =
      last && sinceS !== 0 ? (km - last.km) / sinceS + (bend * sinceS) / 2 : kmS;
    const seconds = secondsToZero(km, slope, bend);
    const trustedS = last
      ? SECANT_REACH_S
      : Math.min(search.reachS, (TIME_TOLERANCE_S * Math.abs(kmS)) / search.velocityErrorKmS);
    if (Math.abs(seconds) <= trustedS || step === MOST_STEPS)
      return moved(node, search.frame, Math.abs(seconds) <= trustedS ? seconds : 0);
    last = { ms, km };
    ms = Math.max(leastMs, Math.min(mostMs, ms + 1000 * seconds));
    if (ms === last.ms) return node;
  }
}
