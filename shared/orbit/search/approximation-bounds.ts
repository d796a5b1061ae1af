import { SGP4_MU } from '../earth.ts';
import type { Arc } from './arc.ts';

export interface ApproximationBounds {
  guardKm: number;
  velocityErrorKmS: number;
  reachS: number;
}

/** Bound of arc and quintic together for a circular orbit, km: measured 0.07 at most (low decaying orbits). */
const GUARD_KM = 0.3;
/** What eccentricity adds, km: SGP4's velocity is off by more there. Measured 0.14 at e = 0.1, 0.2 at 0.3, 0.6 at 0.9. */
const ECCENTRIC_GUARD_KM = 2.5;
/**
 * Largest differences of SGP4's velocity from the derivative of its position, km/s. Measured: 0.09 m/s for e = 0, 0.6 at
 * 0.05, 1.1 at 0.1, 2.3 at 0.3, 2.8 at 0.5, 4.8 at 0.9 (perigee 250 km).
 */
const VELOCITY_ERROR_KM_S = { circular: 1e-4, eccentric: 0.012, most: 0.005 };
/** In the last revolutions drag changes the position in ways the velocity does not know. */
const SINKING_VELOCITY_ERROR_KM_S = 0.02;
/** Part of a revolution over which an acceleration carries a state: 0.5 s near Earth, where the jerk makes 0.2 mm. */
const REACH_OF_PERIOD = 1e-4;

/** How far the approximation of an orbit may be trusted; `mayEnd` for one that drag brings down. */
export function boundsOf(arc: Arc, mayEnd: boolean): ApproximationBounds {
  const axisKm = arc.axisKm[0];
  const eccentricity = Math.hypot(arc.h[0], arc.k[0]);
  const { circular, eccentric, most } = VELOCITY_ERROR_KM_S;
  return {
    guardKm: GUARD_KM + ECCENTRIC_GUARD_KM * eccentricity,
    velocityErrorKmS: mayEnd
      ? SINKING_VELOCITY_ERROR_KM_S
      : Math.min(most, circular + eccentric * eccentricity),
    reachS: REACH_OF_PERIOD * 2 * Math.PI * Math.sqrt(axisKm ** 3 / SGP4_MU),
  };
}
