import { toDegrees, toRadians } from '../units.ts';

/** Sphere used for path geometry without a track, km. */
const EARTH_KM = 6378.137;
/** 20 log10(4 pi / c) for MHz and km (ITU-R P.525, printed 32.4 or 32.45). */
const FREE_SPACE_DB = 20 * Math.log10((4 * Math.PI * 1e9) / 299_792_458);

/** Free-space loss, dB (ITU-R P.525, from memory). Far field; within 0.001 dB. */
export const freeSpaceLossDb = (frequencyMhz: number, rangeKm: number): number =>
  FREE_SPACE_DB + 20 * Math.log10(frequencyMhz * rangeKm);

/** Slant range, central and nadir angle of a satellite on a sphere of 6378.137 km (Maral and Bousquet, from memory). */
export function slantGeometry(altitudeKm: number, elevationDeg: number) {
  const elevation = toRadians(elevationDeg);
  const radius = EARTH_KM + altitudeKm;
  const foot = EARTH_KM * Math.cos(elevation);
  return {
    rangeKm: Math.sqrt(radius ** 2 - foot ** 2) - EARTH_KM * Math.sin(elevation),
    centralDeg: toDegrees(Math.acos(foot / radius)) - elevationDeg,
    nadirDeg: toDegrees(Math.asin(foot / radius)),
  };
}

/** Power flux-density at the ground, dBW/m2 in 4 kHz, of a spectrum that is flat over the bandwidth. */
export const powerFluxDensityDbw = (
  eirpDbw: number,
  rangeKm: number,
  bandwidthKhz: number,
): number =>
  eirpDbw -
  10 * Math.log10(4 * Math.PI * (rangeKm * 1000) ** 2) -
  10 * Math.log10(bandwidthKhz / 4);
