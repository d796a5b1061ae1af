import { toRadians } from '../units.ts';

export interface Air {
  pressureHpa: number;
  temperatureC: number;
}

/** The air the formula was fitted to. */
const STANDARD_AIR: Air = { pressureHpa: 1010, temperatureC: 10 };
const LOWEST_ELEVATION_DEG = -1;
const ABSOLUTE_ZERO_C = -273;

/**
 * Refraction to add to a geometric elevation, deg, for display only: no plan, pass or pointing of Skysheaf contains it.
 * Saemundsson (Sky & Telescope 72, 1986, p. 70; Meeus, Astronomical Algorithms, formula 16.4), for visible light: within
 * 0.1 arc minutes of Bennett's formula between the horizon and 90 deg. Radio waves are bent 10 to 20 % more in moist air
 * (common practice). Below -1 deg there is no meaning: 0.
 */
export function refractionDeg(elevationDeg: number, air: Air = STANDARD_AIR): number {
  if (elevationDeg < LOWEST_ELEVATION_DEG) return 0;
  const argument = toRadians(elevationDeg + 10.3 / (elevationDeg + 5.11));
  const standardMinutes = Math.max(0, 1.02 / Math.tan(argument));
  const density =
    (air.pressureHpa / STANDARD_AIR.pressureHpa) *
    ((STANDARD_AIR.temperatureC - ABSOLUTE_ZERO_C) / (air.temperatureC - ABSOLUTE_ZERO_C));
  return (standardMinutes * density) / 60;
}
