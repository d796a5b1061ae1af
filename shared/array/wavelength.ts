/** Speed of light in vacuum, m/s (exact, SI). */
export const SPEED_OF_LIGHT_M_S = 299_792_458;

/** Free-space wavelength, m. */
export const wavelengthM = (frequencyMhz: number): number =>
  SPEED_OF_LIGHT_M_S / (frequencyMhz * 1e6);
