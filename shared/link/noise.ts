import { dbToPower, powerToDb } from '../units.ts';

/** Reference temperature of noise figures and of ohmic parts, K. */
export const REFERENCE_K = 290;
const COSMIC_K = 2.7;
/** Mean radiating temperature of the atmosphere where nothing better is known, K (ITU-R P.618-14). */
export const MEAN_RADIATING_K = 275;
/** Share of the pattern that looks at warm ground (common practice: 0.03 to 0.10). */
export const GROUND_SHARE = 0.06;

/** Noise temperature of a noise figure, K. */
export const noiseTemperatureK = (noiseFigureDb: number): number =>
  REFERENCE_K * (dbToPower(noiseFigureDb) - 1);

/** Sky noise, K, of a path with this attenuation, scintillation apart (ITU-R P.618-14 eq. 69). */
export function skyNoiseK(attenuationDb: number, meanRadiatingK = MEAN_RADIATING_K): number {
  const passed = dbToPower(-attenuationDb);
  return meanRadiatingK * (1 - passed) + COSMIC_K * passed;
}

/** Antenna noise, K: sky and a share of ground at 290 K (common practice). */
export const antennaNoiseK = (skyK: number, groundShare = GROUND_SHARE): number =>
  (1 - groundShare) * skyK + groundShare * REFERENCE_K;

/** What follows the elements of a receive face. */
export interface ReceiveChain {
  feedLossDb: number;
  lnaNoiseFigureDb: number;
  lnaGainDb: number;
  dividerWays: number;
  dividerExcessDb: number;
  secondNoiseFigureDb: number;
}

/**
 * System noise at the LNA input, K, with an n-way divider behind the LNA (Friis; Maral and Bousquet, from memory):
 * T_A / L + 290 (1 - 1 / L) + T_lna + 290 (n L_x F2 - 1) / G.
 */
export function systemNoiseK(chain: ReceiveChain, antennaK: number): number {
  const behind =
    dbToPower(chain.dividerExcessDb + chain.secondNoiseFigureDb) * chain.dividerWays - 1;
  const dividerK = (REFERENCE_K * behind) / dbToPower(chain.lnaGainDb);
  return (
    noiseBehindLossK(antennaK, chain.feedLossDb, REFERENCE_K) +
    noiseTemperatureK(chain.lnaNoiseFigureDb) +
    dividerK
  );
}

/** What a digital face has behind its LNAs: nothing that counts. */
export const NOISELESS_BACK_END = {
  lnaGainDb: 300,
  dividerWays: 1,
  dividerExcessDb: 0,
  secondNoiseFigureDb: 0,
};

/** Noise of an antenna behind a lossy part at a temperature, K. */
export function noiseBehindLossK(antennaK: number, lossDb: number, physicalK: number): number {
  const passed = dbToPower(-lossDb);
  return antennaK * passed + physicalK * (1 - passed);
}

/** G/T, dB/K, of a gain at the aperture with the losses up to the LNA and the system noise there. */
export const gOverTDbK = (gainDbi: number, lossDb: number, systemK: number): number =>
  gainDbi - lossDb - powerToDb(systemK);
