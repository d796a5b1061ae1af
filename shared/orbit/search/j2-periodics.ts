import { SGP4_EARTH_RADIUS_KM, SGP4_J2, SGP4_MU } from '../earth.ts';

/** Orbit without its short-period terms, at one place: what those terms depend on. */
export interface MeanPlace {
  /** Semi-latus rectum, km. */
  parameterKm: number;
  eccentricitySquared: number;
  /** Components along the Earth's axis of the unit vectors outward, ahead and normal to the plane. */
  outwardZ: number;
  aheadZ: number;
  normalZ: number;
}

/** Short-period terms of J2, first order: additions to a mean place and velocity. */
export interface Periodics {
  radiusFactor: number;
  radiusShiftKm: number;
  /** Turns of the outward vector towards ahead and normal, and of ahead towards normal, rad. */
  towardsAhead: number;
  towardsNormal: number;
  twist: number;
  radialKmS: number;
  transverseKmS: number;
}

const J2_RADIUS_SQUARED = SGP4_J2 * SGP4_EARTH_RADIUS_KM ** 2;

/**
 * The short-period J2 terms of SGP4 (AIAA 2006-6753, appendix; Brouwer 1959) in vector form, which has no singular
 * inclination: with u the argument of latitude, `outwardZ` = sin i sin u, `aheadZ` = sin i cos u, `normalZ` = cos i.
 * Second-order terms are left out: a few metres.
 */
export function j2Periodics(place: MeanPlace): Periodics {
  const { parameterKm, outwardZ, aheadZ, normalZ } = place;
  const beta = Math.sqrt(1 - place.eccentricitySquared);
  const amplitudeKm = (0.5 * J2_RADIUS_SQUARED) / parameterKm;
  const angle = amplitudeKm / parameterKm;
  const axisKm = parameterKm / (beta * beta);
  const meanMotion = Math.sqrt(SGP4_MU / axisKm) / axisKm;
  const polar = 3 * normalZ * normalZ - 1;
  // sin^2 i cos 2u and sin^2 i sin 2u.
  const cos2u = 1 - normalZ * normalZ - 2 * outwardZ * outwardZ;
  const sin2u = 2 * outwardZ * aheadZ;
  return {
    radiusFactor: 1 - 1.5 * angle * beta * polar,
    radiusShiftKm: 0.5 * amplitudeKm * cos2u,
    towardsAhead: 0.25 * angle * sin2u,
    towardsNormal: -1.5 * angle * normalZ * outwardZ,
    twist: 1.5 * angle * normalZ * aheadZ,
    radialKmS: -meanMotion * amplitudeKm * sin2u,
    transverseKmS: meanMotion * amplitudeKm * (cos2u + 1.5 * polar),
  };
}
