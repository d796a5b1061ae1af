/** Reference levels of incident power density, W/m2, above 2 GHz. */
export interface ExposureLevels {
  wholeBodyWM2: number;
  localWM2: number;
  /** An example that defers to local rules. */
  edition: string;
}

/**
 * ICNIRP 2020 reference levels (whole body 30 min, from memory; local 6 min, read in a table that reproduces the guideline),
 * above 2 GHz. An example: local rules come first.
 */
export function exposureLevels(frequencyMhz: number, occupational: boolean): ExposureLevels {
  const ghz = frequencyMhz / 1000;
  const local = occupational ? [200, 275] : [40, 55];
  return {
    wholeBodyWM2: occupational ? 50 : 10,
    localWM2: ghz <= 6 ? (local[0] ?? NaN) : (local[1] ?? NaN) * ghz ** -0.177,
    edition: 'ICNIRP 2020; an example, local rules come first',
  };
}

export interface RadiatingAperture {
  powerW: number;
  areaM2: number;
  wavelengthM: number;
  efficiency: number;
}

/** Bounds of the fields in front of an aperture (FCC OET Bulletin 65, from memory), by its equivalent diameter. */
export function apertureFields({ powerW, areaM2, wavelengthM, efficiency }: RadiatingAperture) {
  const diameterSquared = (4 * areaM2) / Math.PI;
  return {
    surfaceWM2: (4 * powerW) / areaM2,
    nearFieldWM2: (4 * efficiency * powerW) / areaM2,
    nearFieldExtentM: diameterSquared / (4 * wavelengthM),
    farFieldFromM: (0.6 * diameterSquared) / wavelengthM,
  };
}

/** Power density, W/m2, at a distance in front of an aperture: constant near, then 1/R, then 1/R^2. Never below the truth. */
export function powerDensityWM2(aperture: RadiatingAperture, distanceM: number): number {
  const { nearFieldWM2, nearFieldExtentM, farFieldFromM } = apertureFields(aperture);
  if (distanceM <= nearFieldExtentM) return nearFieldWM2;
  if (distanceM <= farFieldFromM) return (nearFieldWM2 * nearFieldExtentM) / distanceM;
  const { powerW, areaM2, wavelengthM, efficiency } = aperture;
  const gain = (4 * Math.PI * areaM2 * efficiency) / wavelengthM ** 2;
  return (powerW * gain) / (4 * Math.PI * distanceM ** 2);
}

/** Distance, m, at which a beam falls to a limit, from the far field: sqrt(EIRP / (4 pi S)). */
export const exposureDistanceM = (eirpDbw: number, limitWM2: number): number =>
  Math.sqrt(10 ** (eirpDbw / 10) / (4 * Math.PI * limitWM2));
