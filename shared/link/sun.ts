import { toDegrees, toRadians, wrapDegrees } from '../units.ts';
import { DAY_MS } from '../time.ts';

const J2000_MS = Date.UTC(2000, 0, 1, 12);
const AU_KM = 149_597_870.7;

/**
 * Azimuth and elevation of the Sun, deg, without refraction: low-precision formula of the Astronomical Almanac (from
 * memory), within 0.01 deg of a library for 1950 to 2050.
 */
export function sunLook(
  place: { latitudeDeg: number; longitudeDeg: number },
  ms: number,
): { azimuthDeg: number; elevationDeg: number } {
  const days = (ms - J2000_MS) / DAY_MS;
  const anomaly = toRadians(357.528 + 0.9856003 * days);
  const longitude = toRadians(
    280.46 + 0.9856474 * days + 1.915 * Math.sin(anomaly) + 0.02 * Math.sin(2 * anomaly),
  );
  const obliquity = toRadians(23.439 - 4e-7 * days);
  const rightAscension = Math.atan2(Math.cos(obliquity) * Math.sin(longitude), Math.cos(longitude));
  const declination = Math.asin(Math.sin(obliquity) * Math.sin(longitude));
  const sidereal = toRadians(280.46061837 + 360.98564736629 * days + place.longitudeDeg);
  const hour = sidereal - rightAscension;
  const latitude = toRadians(place.latitudeDeg);
  const east = -Math.cos(declination) * Math.sin(hour);
  const north =
    Math.cos(latitude) * Math.sin(declination) -
    Math.sin(latitude) * Math.cos(declination) * Math.cos(hour);
  const up =
    Math.sin(latitude) * Math.sin(declination) +
    Math.cos(latitude) * Math.cos(declination) * Math.cos(hour);
  // The station is not at the centre of the Earth: up to 0.0024 deg lower.
  const parallax = toDegrees((6378 / AU_KM) * Math.hypot(east, north));
  return {
    azimuthDeg: wrapDegrees(toDegrees(Math.atan2(east, north))),
    elevationDeg: toDegrees(Math.asin(up)) - parallax,
  };
}

/** Mean radius of the Sun, deg. */
export const SOLAR_RADIUS_DEG = 0.27;

/** Radius of the zone in which the Sun disturbs a beam: half its width and the Sun's radius (rule of the trade). */
export const sunZoneDeg = (hpbwDeg: number, solarRadiusDeg = SOLAR_RADIUS_DEG): number =>
  hpbwDeg / 2 + solarRadiusDeg;

/** For a direction that stands still: longest daily transit, min, and number of days (0.25 deg/min, 0.4 deg/day; from memory). */
export const sunOutage = (zoneDeg: number): { longestMinutes: number; days: number } => ({
  longestMinutes: (2 * zoneDeg) / 0.25,
  days: (2 * zoneDeg) / 0.4,
});
