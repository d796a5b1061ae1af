const LIGHT_KM_S = 299_792.458;

/** One-way Doppler shift, Hz, positive while approaching, to first order in v/c (1e-5 of the shift in low orbit). */
export const dopplerHz = (frequencyMhz: number, rangeRateKmS: number): number =>
  (-frequencyMhz * 1e6 * rangeRateKmS) / LIGHT_KM_S;
