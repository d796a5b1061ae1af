import type { HorizonState } from '../track.ts';
import type { Node } from './node.ts';
import { segmentBetween, stateOn, type Segment } from './segment.ts';

/** Consecutive nodes over a time in which the satellite may be above the mask; it is below before and after. */
export interface Run {
  /** The satellite is below the mask wherever its up component is below this, km. */
  limitKm: number;
  nodes: Node[];
  /** Made when first asked for. */
  segments: (Segment | undefined)[];
}

/** The segment between a node of the run and the next. */
export function segmentAfter(run: Run, index: number): Segment {
  const made = run.segments[index];
  if (made) return made;
  const [from, to] = [run.nodes[index], run.nodes[index + 1]];
  if (!from || !to)
    throw new RangeError(`a run of ${run.nodes.length} nodes has no segment ${index}`);
  return (run.segments[index] = segmentBetween(from, to));
}

/** Index of the segment that holds an instant; the first or last one for instants outside. */
export function segmentIndexAt(run: Run, ms: number): number {
  let [low, high] = [0, run.nodes.length - 1];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((run.nodes[middle]?.atMs ?? 0) <= ms) low = middle;
    else high = middle;
  }
  return low;
}

/** State of the approximation at an instant. */
export const approximateState = (run: Run, ms: number): HorizonState =>
  stateOn(segmentAfter(run, segmentIndexAt(run, ms)), ms);

export const firstNode = (run: Run): Node => nodeAt(run, 0);
export const lastNode = (run: Run): Node => nodeAt(run, run.nodes.length - 1);

function nodeAt(run: Run, index: number): Node {
  const node = run.nodes[index];
  if (!node) throw new RangeError('a run has at least two nodes');
  return node;
}
