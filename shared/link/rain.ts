import { toRadians } from '../units.ts';

interface Fit {
  a: readonly number[];
  b: readonly number[];
  c: readonly number[];
  slope: number;
  constant: number;
}

/** Coefficients of ITU-R P.838-3, tables 1 to 4. */
const K_H: Fit = {
  a: [-5.3398, -0.35351, -0.23789, -0.94158],
  b: [-0.10008, 1.2697, 0.86036, 0.64552],
  c: [1.13098, 0.454, 0.15354, 0.16817],
  slope: -0.18961,
  constant: 0.71147,
};
const K_V: Fit = {
  a: [-3.80595, -3.44965, -0.39902, 0.50167],
  b: [0.56934, -0.22911, 0.73042, 1.07319],
  c: [0.81061, 0.51059, 0.11899, 0.27195],
  slope: -0.16398,
  constant: 0.63297,
};
const ALPHA_H: Fit = {
  a: [-0.14318, 0.29591, 0.32177, -5.3761, 16.1721],
  b: [1.82442, 0.77564, 0.63773, -0.9623, -3.2998],
  c: [-0.55187, 0.19822, 0.13164, 1.47828, 3.4399],
  slope: 0.67849,
  constant: -1.95537,
};
const ALPHA_V: Fit = {
  a: [-0.07771, 0.56727, -0.20238, -48.2991, 48.5833],
  b: [2.3384, 0.95545, 1.1452, 0.791669, 0.791459],
  c: [-0.76284, 0.54039, 0.26809, 0.116226, 0.116479],
  slope: -0.053739,
  constant: 0.83433,
};

function fitted({ a, b, c, slope, constant }: Fit, logGhz: number): number {
  const bells = a.reduce(
    (sum, height, j) => sum + height * Math.exp(-(((logGhz - (b[j] ?? NaN)) / (c[j] ?? NaN)) ** 2)),
    0,
  );
  return bells + slope * logGhz + constant;
}

export interface RainCoefficients {
  kH: number;
  alphaH: number;
  kV: number;
  alphaV: number;
  k: number;
  alpha: number;
}

/** k and alpha of gamma = k R^alpha (ITU-R P.838-3), 1 to 1000 GHz; tilt 0 horizontal, 45 circular, 90 vertical. */
export function rainCoefficients(
  frequencyMhz: number,
  path: { elevationDeg: number; tiltDeg: number },
): RainCoefficients {
  const logGhz = Math.log10(frequencyMhz / 1000);
  const [kH, kV] = [10 ** fitted(K_H, logGhz), 10 ** fitted(K_V, logGhz)];
  const [alphaH, alphaV] = [fitted(ALPHA_H, logGhz), fitted(ALPHA_V, logGhz)];
  const turn = Math.cos(toRadians(path.elevationDeg)) ** 2 * Math.cos(2 * toRadians(path.tiltDeg));
  const k = (kH + kV + (kH - kV) * turn) / 2;
  const alpha = (kH * alphaH + kV * alphaV + (kH * alphaH - kV * alphaV) * turn) / (2 * k);
  return { kH, alphaH, kV, alphaV, k, alpha };
}

/** Rain at a station: what is exceeded 0.01 % of the year, and how high it begins. */
export interface RainSite {
  latitudeDeg: number;
  heightKm: number;
  rainHeightKm: number;
  /** mm/h exceeded 0.01 % of the average year: 20-35 temperate, 40-60 subtropical, 80-120 equatorial. */
  rainRateMmH: number;
}

export interface RainPath {
  frequencyMhz: number;
  elevationDeg: number;
  tiltDeg: number;
}

const LOW_DEG = 5;
const EARTH_KM = 8500;

/** Path through rain, km: its slant length and the length on the ground. */
function rainPath(site: RainSite, elevationDeg: number): { slantKm: number; groundKm: number } {
  const sine = Math.sin(toRadians(elevationDeg));
  const upKm = site.rainHeightKm - site.heightKm;
  const slantKm =
    elevationDeg >= LOW_DEG
      ? upKm / sine
      : (2 * upKm) / (Math.sqrt(sine ** 2 + (2 * upKm) / EARTH_KM) + sine);
  return { slantKm, groundKm: slantKm * Math.cos(toRadians(elevationDeg)) };
}

/** Attenuation exceeded 0.01 % of the year, dB (ITU-R P.618-14, 2.2.1.1, steps 3 to 9). */
function rainAtHundredth(site: RainSite, path: RainPath, gamma: number): number {
  const { frequencyMhz, elevationDeg } = path;
  const ghz = frequencyMhz / 1000;
  const elevation = toRadians(elevationDeg);
  const { groundKm } = rainPath(site, elevationDeg);
  const upKm = site.rainHeightKm - site.heightKm;
  const horizontal =
    1 / (1 + 0.78 * Math.sqrt((groundKm * gamma) / ghz) - 0.38 * (1 - Math.exp(-2 * groundKm)));
  const zeta = Math.atan2(upKm, groundKm * horizontal);
  const lengthKm =
    zeta > elevation ? (groundKm * horizontal) / Math.cos(elevation) : upKm / Math.sin(elevation);
  const chi = Math.max(0, 36 - Math.abs(site.latitudeDeg));
  const fall = 31 * (1 - Math.exp(-elevationDeg / (1 + chi)));
  const vertical =
    1 /
    (1 + Math.sqrt(Math.sin(elevation)) * ((fall * Math.sqrt(lengthKm * gamma)) / ghz ** 2 - 0.45));
  return gamma * lengthKm * vertical;
}

function latitudeTerm(site: RainSite, elevationDeg: number, percent: number): number {
  const beyond = Math.abs(site.latitudeDeg) - 36;
  if (percent >= 1 || beyond >= 0) return 0;
  if (elevationDeg >= 25) return -0.005 * beyond;
  return -0.005 * beyond + 1.8 - 4.25 * Math.sin(toRadians(elevationDeg));
}

/**
 * Rain attenuation exceeded for `percent` of the average year, dB (ITU-R P.618-14, 2.2.1.1). Valid from 0.001 to 5 %,
 * to 55 GHz; 0 where the station stands above the rain.
 */
export function rainLoss(
  site: RainSite,
  path: RainPath,
  percent: number,
): { gammaDbKm: number; hundredthDb: number; lossDb: number } {
  const { k, alpha } = rainCoefficients(path.frequencyMhz, path);
  const gammaDbKm = k * site.rainRateMmH ** alpha;
  if (site.rainHeightKm <= site.heightKm) return { gammaDbKm, hundredthDb: 0, lossDb: 0 };
  const hundredthDb = rainAtHundredth(site, path, gammaDbKm);
  const beta = latitudeTerm(site, path.elevationDeg, percent);
  const exponent =
    0.655 +
    0.033 * Math.log(percent) -
    0.045 * Math.log(hundredthDb) -
    beta * (1 - percent) * Math.sin(toRadians(path.elevationDeg));
  return { gammaDbKm, hundredthDb, lossDb: hundredthDb * (percent / 0.01) ** -exponent };
}
