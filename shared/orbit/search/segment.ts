import type { HorizonState } from '../track.ts';
import type { Node } from './node.ts';

/**
 * A quintic Hermite segment between two nodes: position, velocity and acceleration agree at both ends. Its error for an
 * orbit of angular rate n is about a (n h)^6 / 46,080 (remainder of the interpolation) for a distance h of the nodes.
 */
export interface Segment {
  fromMs: number;
  seconds: number;
  east: Float64Array;
  north: Float64Array;
  up: Float64Array;
}

/** Powers of the segment's own time, 0..1, that meet both ends. */
function quintic(
  [p0, v0, a0]: readonly [number, number, number],
  [p1, v1, a1]: readonly [number, number, number],
  h: number,
): Float64Array {
  const [dp, u0, u1] = [p1 - p0, v0 * h, v1 * h];
  const [b0, b1] = [(a0 * h * h) / 2, (a1 * h * h) / 2];
  return Float64Array.of(
    p0,
    u0,
    b0,
    10 * dp - 6 * u0 - 4 * u1 - 3 * b0 + b1,
    -15 * dp + 8 * u0 + 7 * u1 + 3 * b0 - 2 * b1,
    6 * dp - 3 * u0 - 3 * u1 - b0 + b1,
  );
}

export function segmentBetween(from: Node, to: Node): Segment {
  const seconds = (to.atMs - from.atMs) / 1000;
  return {
    fromMs: from.atMs,
    seconds,
    east: quintic(
      [from.eastKm, from.eastKmS, from.eastKmS2],
      [to.eastKm, to.eastKmS, to.eastKmS2],
      seconds,
    ),
    north: quintic(
      [from.northKm, from.northKmS, from.northKmS2],
      [to.northKm, to.northKmS, to.northKmS2],
      seconds,
    ),
    up: quintic([from.upKm, from.upKmS, from.upKmS2], [to.upKm, to.upKmS, to.upKmS2], seconds),
  };
}

const at = (c: Float64Array, i: number): number => c[i] ?? 0;
const value = (c: Float64Array, t: number): number =>
  at(c, 0) + t * (at(c, 1) + t * (at(c, 2) + t * (at(c, 3) + t * (at(c, 4) + t * at(c, 5)))));
const slope = (c: Float64Array, t: number): number =>
  at(c, 1) + t * (2 * at(c, 2) + t * (3 * at(c, 3) + t * (4 * at(c, 4) + t * 5 * at(c, 5))));

/** State on a segment; a few seconds outside are harmless. */
export function stateOn(segment: Segment, ms: number): HorizonState {
  const t = (ms - segment.fromMs) / (segment.seconds * 1000);
  const rate = 1 / segment.seconds;
  return {
    eastKm: value(segment.east, t),
    northKm: value(segment.north, t),
    upKm: value(segment.up, t),
    eastKmS: slope(segment.east, t) * rate,
    northKmS: slope(segment.north, t) * rate,
    upKmS: slope(segment.up, t) * rate,
  };
}

/**
 * Upper bound of the up component between two nodes: the largest of the six Bernstein coefficients, whose hull holds the
 * quintic (Farouki 2012, section 3).
 */
export function highestUpKm(from: Node, to: Node): number {
  const h = (to.atMs - from.atMs) / 5000;
  const [u0, u1] = [from.upKm + h * from.upKmS, to.upKm - h * to.upKmS];
  const bend = (h * h * 5) / 4;
  return Math.max(
    from.upKm,
    u0,
    u0 + h * from.upKmS + bend * from.upKmS2,
    u1 - h * to.upKmS + bend * to.upKmS2,
    u1,
    to.upKm,
  );
}
