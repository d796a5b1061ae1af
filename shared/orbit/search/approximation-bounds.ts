import { SGP4_MU } from '../earth.ts';
import type { Arc } from './arc.ts';

export interface ApproximationBounds {
  guardKm: number;
  velocityErrorKmS: number;
  reachS: number;
}

/** Bound of arc and quintic together for a circular orbit, km: measured 0.07 at most (low decaying orbits). */
const GUARD_KM = 0.25;
/** What eccentricity adds, km: SGP4's velocity is off by up to 2.3 m/s there. Measured 0.15 at e = 0.3, 0.4 at 0.74. */
const ECCENTRIC_GUARD_KM = 3.5;
/** Largest differences of SGP4's velocity from the derivative of its position: 68 mm/s near Earth, 2.3 m/s at e = 0.7. */
const VELOCITY_ERROR_KM_S = 1e-4;
const ECCENTRIC_VELOCITY_ERROR_KM_S = 5e-3;
/** Part of a revolution over which an acceleration carries a state: 0.5 s near Earth, where the jerk makes 0.2 mm. */
const REACH_OF_PERIOD = 1e-4;

/** How far the approximation of an orbit may be trusted. */
export function boundsOf(arc: Arc): ApproximationBounds {
  const axisKm = arc.axisKm[0];
  const eccentricitySquared = arc.h[0] ** 2 + arc.k[0] ** 2;
  return {
    guardKm: GUARD_KM + ECCENTRIC_GUARD_KM * eccentricitySquared,
    velocityErrorKmS: VELOCITY_ERROR_KM_S + ECCENTRIC_VELOCITY_ERROR_KM_S * eccentricitySquared,
    reachS: REACH_OF_PERIOD * 2 * Math.PI * Math.sqrt(axisKm ** 3 / SGP4_MU),
  };
}
