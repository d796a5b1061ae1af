import { DAY_MS, SECOND_MS } from '../time.ts';
import { SGP4_EARTH_RADIUS_KM, SGP4_MU } from './earth.ts';

/** Orbits SGP4 has a meaning for; wider than any real one. */
const MEAN_MOTION_REV_PER_DAY = { least: 0.05, most: 17.5 };
/** A perigee below this is inside the dense atmosphere: no full revolution is left. */
const LEAST_PERIGEE_HEIGHT_KM = 80;
const LARGEST_BSTAR = 1;

export interface MeanElements {
  meanMotionRevPerDay: number;
  eccentricity: number;
  inclinationDeg: number;
  raanDeg: number;
  argumentOfPerigeeDeg: number;
  meanAnomalyDeg: number;
  bstar: number;
}

export type RangedField = keyof MeanElements | 'perigee';

export interface RangeFault {
  field: RangedField;
  code: string;
  reason: string;
}

/** Height of the perigee above the equatorial radius, km, from Kepler's third law (no J2: good to some 10 km). */
export function perigeeHeightKm(meanMotionRevPerDay: number, eccentricity: number): number {
  const radPerSecond = (meanMotionRevPerDay * 2 * Math.PI) / (DAY_MS / SECOND_MS);
  return Math.cbrt(SGP4_MU / radPerSecond ** 2) * (1 - eccentricity) - SGP4_EARTH_RADIUS_KM;
}

const isAngle = (deg: number): boolean => deg >= -180 && deg < 360;

function angleFault(field: RangedField, code: string, words: string, deg: number): RangeFault[] {
  if (isAngle(deg)) return [];
  return [{ field, code, reason: `The ${words} is ${deg} deg; it must be below 360 deg.` }];
}

function shapeFaults(elements: MeanElements): RangeFault[] {
  const { meanMotionRevPerDay: n, eccentricity: e } = elements;
  const { least, most } = MEAN_MOTION_REV_PER_DAY;
  if (!(n >= least && n <= most)) {
    const reason = `The mean motion is ${n} rev/day; it must lie between ${least} and ${most} rev/day.`;
    return [{ field: 'meanMotionRevPerDay', code: 'RANGE_MEAN_MOTION', reason }];
  }
  if (!(e >= 0 && e < 1)) {
    const reason = `The eccentricity is ${e}; it must be at least 0 and below 1.`;
    return [{ field: 'eccentricity', code: 'RANGE_ECCENTRICITY', reason }];
  }
  const heightKm = perigeeHeightKm(n, e);
  if (heightKm >= LEAST_PERIGEE_HEIGHT_KM) return [];
  const reason =
    `Mean motion and eccentricity put the perigee at ${Math.round(heightKm)} km height; ` +
    `it must be at least ${LEAST_PERIGEE_HEIGHT_KM} km. Check both values.`;
  return [{ field: 'perigee', code: 'RANGE_PERIGEE', reason }];
}

/** Elements outside the range in which they can describe an orbit; empty when all is well. */
export function rangeFaults(elements: MeanElements): RangeFault[] {
  const { inclinationDeg: i, bstar } = elements;
  const faults: RangeFault[] = [];
  if (!(i >= 0 && i <= 180)) {
    const reason = `The inclination is ${i} deg; it must lie between 0 and 180 deg.`;
    faults.push({ field: 'inclinationDeg', code: 'RANGE_INCLINATION', reason });
  }
  const { raanDeg, argumentOfPerigeeDeg, meanAnomalyDeg } = elements;
  const node = 'right ascension of the ascending node';
  faults.push(...angleFault('raanDeg', 'RANGE_RA_OF_ASC_NODE', node, raanDeg));
  const perigee = 'argument of perigee';
  const pericenter = 'RANGE_ARG_OF_PERICENTER';
  faults.push(...angleFault('argumentOfPerigeeDeg', pericenter, perigee, argumentOfPerigeeDeg));
  faults.push(
    ...angleFault('meanAnomalyDeg', 'RANGE_MEAN_ANOMALY', 'mean anomaly', meanAnomalyDeg),
  );
  faults.push(...shapeFaults(elements));
  if (!(Math.abs(bstar) <= LARGEST_BSTAR)) {
    const reason = `The drag term B* is ${bstar} per Earth radius; its size must not exceed 1.`;
    faults.push({ field: 'bstar', code: 'RANGE_BSTAR', reason });
  }
  return faults;
}
