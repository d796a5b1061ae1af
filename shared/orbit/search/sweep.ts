import type { MaskProfile } from '../horizon-mask.ts';
import type { HorizonFrame } from '../observer.ts';
import type { Arc } from './arc.ts';
import { arcStateAt } from './arc-state.ts';
import { inertialNode, type Node } from './node.ts';
import type { Run } from './run.ts';
import { highestUpKm } from './segment.ts';

/** Each coarse segment that may rise above the mask is cut into this many. */
const FINE_PIECES = 4;

/** Bound of the quintic's error between coarse nodes, in semi-major axes: twice the largest measured and more. */
const COARSE_GUARD = 0.0012;

/**
 * Coarse nodes a turn in eccentric longitude. The quintic between them then stays within 0.0006 semi-major axes of the
 * orbit; measured for perigees of 250 to 8,000 km and five inclinations: 5.5e-4 at 4 nodes (circular, near Earth, where
 * the seen motion is fastest), 1.3e-4 at 6 (e = 0.05), 3e-4 at 8 (e = 0.4), 8e-5 at 16 (e = 0.75), 7e-5 at 32 (e = 0.85).
 */
export function nodesPerTurn(axisKm: number, eccentricity: number): number {
  if (eccentricity >= 0.75) return 32;
  if (eccentricity >= 0.4) return 16;
  if (eccentricity >= 0.05) return 8;
  return axisKm < 12_000 && eccentricity < 0.02 ? 4 : 6;
}

/** The zenith of the ellipsoid and the direction from the Earth's centre differ by at most this, rad. */
const ZENITH_ALLOWANCE_RAD = 0.0034;
/** Distance of the short-period terms from the mean perigee and apogee, km (10 km near Earth). */
const RADIUS_ALLOWANCE_KM = 25;

/** Range of a satellite of a given geocentric distance at an elevation above the observer's own horizon. */
function rangeKm(radiusKm: number, observerKm: number, elevation: number): number {
  const across = observerKm * Math.cos(elevation);
  return Math.sqrt(Math.max(0, radiusKm ** 2 - across ** 2)) - observerKm * Math.sin(elevation);
}

/** The up component that a satellite of this arc has at least wherever it is above the mask, km. */
function leastUpKm(arc: Arc, frame: HorizonFrame, profile: MaskProfile): number {
  const observerKm = Math.hypot(frame.axisDistanceKm, frame.zKm);
  const eccentricity = Math.hypot(arc.h[0], arc.k[0]);
  const mask = profile.lowestRad;
  if (mask >= 0) {
    const perigeeKm = arc.axisKm[0] * (1 - eccentricity) - RADIUS_ALLOWANCE_KM;
    return rangeKm(perigeeKm, observerKm, mask + ZENITH_ALLOWANCE_RAD) * Math.sin(mask);
  }
  const apogeeKm = arc.axisKm[0] * (1 + eccentricity) + RADIUS_ALLOWANCE_KM;
  return rangeKm(apogeeKm, observerKm, mask - ZENITH_ALLOWANCE_RAD) * Math.sin(mask);
}

/** Eccentric longitudes of the coarse nodes strictly inside an arc, and its ends. */
function coarseLongitudes(arc: Arc): number[] {
  const step = (2 * Math.PI) / nodesPerTurn(arc.axisKm[0], Math.hypot(arc.h[0], arc.k[0]));
  const longitudes = [arc.fromLongitude];
  const first = Math.floor(arc.fromLongitude / step) + 1;
  // A sliver at the ends would only cost a node.
  for (let index = first; index * step < arc.toLongitude - step / 8; index++)
    if (index * step > arc.fromLongitude + step / 8) longitudes.push(index * step);
  longitudes.push(arc.toLongitude);
  return longitudes;
}

function nodeAtLongitude(arc: Arc, frame: HorizonFrame, longitude: number): Node {
  const state = arcStateAt(arc, longitude);
  return inertialNode(state, frame, state.ms, state.driftRad);
}

/**
 * Sweeps arcs with a few nodes a revolution and keeps the times in which the hull of the up component does not rule out
 * that the satellite is above the lowest elevation of the mask. Costs no SGP4 call: the ends of arcs are their anchors,
 * all other nodes come from the arcs.
 */
export function sweep(arcs: readonly Arc[], frame: HorizonFrame, profile: MaskProfile): Run[] {
  const runs: Run[] = [];
  let open: Run | null = null;
  for (const arc of arcs) {
    const limitKm = leastUpKm(arc, frame, profile) - COARSE_GUARD * arc.axisKm[0];
    const longitudes = coarseLongitudes(arc);
    let before = inertialNode(arc.from.teme, frame, arc.fromMs);
    for (let index = 1; index < longitudes.length; index++) {
      const [from, to] = [longitudes[index - 1] ?? 0, longitudes[index] ?? 0];
      const isLast = index === longitudes.length - 1;
      const after = isLast
        ? inertialNode(arc.to.teme, frame, arc.toMs)
        : nodeAtLongitude(arc, frame, to);
      if (highestUpKm(before, after) < limitKm) open = null;
      else {
        if (!open) runs.push((open = { limitKm, nodes: [before], segments: [] }));
        for (let piece = 1; piece < FINE_PIECES; piece++)
          open.nodes.push(nodeAtLongitude(arc, frame, from + ((to - from) * piece) / FINE_PIECES));
        open.nodes.push(after);
      }
      before = after;
    }
  }
  return runs;
}
