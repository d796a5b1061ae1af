import { DAY_MS, SECOND_MS } from '../time.ts';

/** 2000-01-01T12:00:00, the origin of the sidereal-time polynomial, as POSIX ms. */
const J2000_MS = 946_728_000_000;
const DAYS_PER_CENTURY = 36_525;
const SECONDS_PER_DAY = 86_400;
const TURN_RAD = 2 * Math.PI;

/**
 * Greenwich mean sidereal time of 1982, rad in [0, 2 pi): the angle that turns SGP4's TEME frame into the Earth-fixed
 * one (Aoki et al. 1982; AIAA 2006-6753, appendix C). `ut1Ms` counts UT1; with UT1 = UTC (|UT1 - UTC| < 0.9 s) a LEO
 * crossing moves by up to 0.17 s. The whole days are split off first, so the angle keeps 1e-11 rad.
 */
export function meanSiderealTime(ut1Ms: number): number {
  const days = (ut1Ms - J2000_MS) / DAY_MS;
  const centuries = days / DAYS_PER_CENTURY;
  const slowSeconds =
    67_310.54841 + centuries * (8_640_184.812866 + centuries * (0.093104 - 6.2e-6 * centuries));
  const turns = days - Math.floor(days) + slowSeconds / SECONDS_PER_DAY;
  return (turns - Math.floor(turns)) * TURN_RAD;
}

/** UT1 of a UTC instant, ms. */
export const ut1Of = (utcMs: number, ut1MinusUtcSeconds: number): number =>
  utcMs + ut1MinusUtcSeconds * SECOND_MS;
