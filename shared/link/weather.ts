import type { RainSite } from './rain.ts';

/** What the air over a station is planned with. */
export interface LinkWeather {
  rain: RainSite;
  /** Share of the average year in which rain may be worse than planned, %. */
  unavailablePercent: number;
}

const bounded = (value: number): number => Math.min(1, Math.max(0, value));

/**
 * Weather to plan with where a station states none: rain height falling from 5 km in the tropics to 2.7 km from 50 deg of
 * latitude on, 95 / 50 / 30 / 20 mm/h by belts, 0.5 % of the year (common practice, not a measured map).
 */
export function typicalWeather(latitudeDeg: number, heightM: number): LinkWeather {
  const away = Math.abs(latitudeDeg);
  const rainRateMmH = away < 23 ? 95 : away < 36 ? 50 : away < 55 ? 30 : 20;
  const rainHeightKm = 5 - 2.3 * bounded((away - 23) / 27);
  return {
    rain: { latitudeDeg, heightKm: heightM / 1000, rainHeightKm, rainRateMmH },
    unavailablePercent: 0.5,
  };
}
