import type { MaskProfile } from '../horizon-mask.ts';
import type { HorizonFrame } from '../observer.ts';
import type { HorizonState } from '../track.ts';
import type { Node } from './node.ts';
import { approximateState, type Run } from './run.ts';

/** What a search works with. */
export interface Search {
  /** The truth, at an instant: one SGP4 call. */
  exactAt: (ms: number) => Node;
  frame: HorizonFrame;
  profile: MaskProfile;
  /** The window, or the part of it in which the orbit exists. */
  fromMs: number;
  toMs: number;
  /** Bound of the distance between the approximation and SGP4, km; checked at every exact state. */
  guardKm: number;
  /** How far SGP4's velocity may be from the derivative of its position, km/s. */
  velocityErrorKmS: number;
  /** Longest step for which a state is moved by its acceleration instead of computed anew, s. */
  reachS: number;
  violations: number;
}

const distanceKm = (a: HorizonState, b: HorizonState): number =>
  Math.hypot(a.eastKm - b.eastKm, a.northKm - b.northKm, a.upKm - b.upKm);

/** The exact state at an instant, and the check of the guard. */
export function exactNode(search: Search, run: Run, ms: number): Node {
  const node = search.exactAt(ms);
  if (distanceKm(node, approximateState(run, ms)) > search.guardKm) search.violations += 1;
  return node;
}
