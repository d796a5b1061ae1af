/** Numbers as they stand on screen: a true minus, a fixed count of decimals, "–" for what is missing. */

export const MISSING = '–';

export const decimals = (value: number | null | undefined, digits: number): string => {
  if (value === null || value === undefined || !Number.isFinite(value)) return MISSING;
  const text = Math.abs(value).toFixed(digits);
  return value < 0 && Number(text) !== 0 ? `−${text}` : text;
};
/** `+11.4`, `−3.1`. */
export const signed = (value: number, digits: number): string =>
  value > 0 && Number(value.toFixed(digits)) !== 0
    ? `+${decimals(value, digits)}`
    : decimals(value, digits);
/** Three figures, as azimuths are read: `012`. */
export const azimuth = (deg: number): string => String(Math.round(deg) % 360).padStart(3, '0');
export const degrees = (value: number): string => `${Math.round(value)}°`;

const POINTS = 'N NNE NE ENE E ESE SE SSE S SSW SW WSW W WNW NW NNW'.split(' ');
/** Point of the compass nearest to an azimuth. */
export const compassPoint = (azimuthDeg: number): string =>
  POINTS[Math.round(azimuthDeg / 22.5) % 16] ?? 'N';
/** `NNE to W`. */
export const directionWords = (pass: { aosAzimuthDeg: number; losAzimuthDeg: number }): string =>
  `${compassPoint(pass.aosAzimuthDeg)} to ${compassPoint(pass.losAzimuthDeg)}`;
/** A pass in words: `max 54°, NNE to W`. */
export const passWords = (pass: {
  maxElevationDeg: number;
  aosAzimuthDeg: number;
  losAzimuthDeg: number;
}): string => `max ${degrees(pass.maxElevationDeg)}, ${directionWords(pass)}`;

/** `1 contact`, `2 contacts`. */
export const counted = (count: number, one: string, many = `${one}s`): string =>
  `${count} ${count === 1 ? one : many}`;

export const frequency = (mhz: number): string =>
  mhz
    .toLocaleString('en-GB', { minimumFractionDigits: 1, maximumFractionDigits: 3 })
    .replaceAll(',', ' ');
export const bytes = (count: number): string => count.toLocaleString('en-GB').replaceAll(',', ' ');
