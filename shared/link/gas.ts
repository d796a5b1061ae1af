import { toRadians } from '../units.ts';

/**
 * Zenith attenuation by oxygen and water vapour at sea level, dB, by frequency in MHz: ITU-R P.676-13 Annex 2 for 1013.25 hPa
 * dry pressure, 15 C, 7.5 g/m3 (computed for the project's reference with the Recommendation's line data).
 */
const ZENITH_DB: readonly (readonly [number, number])[] = [
  [1500, 0.0339],
  [2200, 0.0356],
  [3000, 0.0368],
  [4000, 0.0381],
  [5000, 0.0395],
  [6000, 0.0413],
  [7200, 0.0438],
  [8200, 0.0463],
  [9000, 0.0487],
  [11000, 0.0562],
  [12000, 0.0612],
  [14000, 0.0748],
  [16000, 0.098],
  [17000, 0.1171],
  [17500, 0.1299],
  [18500, 0.1663],
  [19000, 0.1924],
  [20000, 0.2712],
  [21000, 0.402],
  [22235, 0.5689],
  [23000, 0.5453],
  [24000, 0.4368],
  [25000, 0.3514],
  [26000, 0.2991],
  [27000, 0.2688],
  [28000, 0.2525],
  [29000, 0.245],
  [31000, 0.2466],
];

/** Zenith attenuation by gases, dB, 1.5 to 31 GHz: log over log, within 1 %; the ends are kept outside. Vapour varies by 0.3 to 2. */
export function zenithGasDb(frequencyMhz: number): number {
  const index = ZENITH_DB.findIndex(([mhz]) => mhz > frequencyMhz);
  const [before, after] = [ZENITH_DB[index - 1], ZENITH_DB[index]];
  if (!after) return ZENITH_DB.at(-1)?.[1] ?? NaN;
  if (!before) return after[1];
  const along = Math.log(frequencyMhz / before[0]) / Math.log(after[0] / before[0]);
  return before[1] * (after[1] / before[1]) ** along;
}

/** Below this the flat-layer law is too pessimistic, deg; lower elevations are given its value. */
export const LOWEST_GAS_ELEVATION_DEG = 5;

/** Attenuation by gases along the path, dB: zenith value over sin(elevation) from 5 deg up (ITU-R P.676 Annex 2). */
export const gasLossDb = (zenithDb: number, elevationDeg: number): number =>
  zenithDb / Math.sin(toRadians(Math.max(LOWEST_GAS_ELEVATION_DEG, elevationDeg)));
