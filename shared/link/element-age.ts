import { toDegrees } from '../units.ts';
import { slantGeometry } from './path.ts';
import { pointingLossDb } from './pointing.ts';

/** How an element set grows old: error along the track at its epoch and per day (common practice: 1 km, 0.5 to 3 km/day). */
export interface ElementAging {
  atEpochKm: number;
  growthKmPerDay: number;
}
export const TYPICAL_AGING: ElementAging = { atEpochKm: 1, growthKmPerDay: 1.5 };

/** Error along the track, km; age may be negative for a set used before its epoch. */
export const alongTrackErrorKm = (aging: ElementAging, ageDays: number): number =>
  aging.atEpochKm + aging.growthKmPerDay * Math.abs(ageDays);

/** Largest pointing error by an error along the track, deg: seen at right angles. */
export const worstPointingErrorDeg = (errorKm: number, rangeKm: number): number =>
  toDegrees(Math.atan2(errorKm, rangeKm));

const MU_KM3_S2 = 398_600.4418;
const EARTH_KM = 6378.137;

/** What the age of a set does on a circular orbit: error, time shift, worst angle, loss of a beam. */
export function elementAgeEffect(
  aging: ElementAging & { ageDays: number },
  look: { altitudeKm: number; elevationDeg: number; hpbwDeg: number },
) {
  const alongTrackKm = alongTrackErrorKm(aging, aging.ageDays);
  const speedKmS = Math.sqrt(MU_KM3_S2 / (EARTH_KM + look.altitudeKm));
  const { rangeKm } = slantGeometry(look.altitudeKm, look.elevationDeg);
  const worstAngleDeg = worstPointingErrorDeg(alongTrackKm, rangeKm);
  return {
    alongTrackKm,
    timeShiftS: alongTrackKm / speedKmS,
    rangeKm,
    worstAngleDeg,
    lossDb: pointingLossDb(worstAngleDeg, look.hpbwDeg),
  };
}

/** Age, days, at which the worst pointing loss reaches a limit; 0 when it does at the epoch. */
export function largestElementAgeDays(
  aging: ElementAging,
  look: { altitudeKm: number; elevationDeg: number; hpbwDeg: number },
  lossLimitDb: number,
): number {
  const { rangeKm } = slantGeometry(look.altitudeKm, look.elevationDeg);
  const errorKm = rangeKm * Math.tan((look.hpbwDeg * Math.sqrt(lossLimitDb / 12) * Math.PI) / 180);
  return Math.max(0, (errorKm - aging.atEpochKm) / aging.growthKmPerDay);
}
