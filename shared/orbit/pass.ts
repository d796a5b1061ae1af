import type { Observer } from './observer.ts';
import type { ElementLines } from './propagation.ts';

/** Horizon mask: one elevation all around, deg, or knots [azimuth, elevation] in ascending azimuth, linear between. */
export type HorizonMask = number | readonly (readonly [azimuthDeg: number, elevationDeg: number])[];

export interface PassQuery {
  elements: ElementLines;
  observer: Observer;
  mask: HorizonMask;
  fromMs: number;
  toMs: number;
}

/** A maximal interval above the mask inside the window. Times are ms UTC, fractional, good to 2 ms. */
export interface PredictedPass {
  aosMs: number;
  /** Instant of the highest elevation inside the pass. */
  tcaMs: number;
  losMs: number;
  maxElevationDeg: number;
  aosAzimuthDeg: number;
  tcaAzimuthDeg: number;
  losAzimuthDeg: number;
  tcaRangeKm: number;
  /** Under way when the window (or the orbit) begins: AOS is the window's beginning. */
  startsBefore: boolean;
  /** Still under way when the window (or the orbit) ends: LOS is that end. */
  endsAfter: boolean;
}

export interface PassSearchResult {
  passes: PredictedPass[];
  /** What the search cost. */
  sgp4Calls: number;
  /** How often an exact position lay outside the bound of its approximation, so that the search was refined. */
  guardViolations: number;
  /** Where SGP4 fails for the first time inside the window, and its code; nothing after it is reported. */
  orbitEnd: { atMs: number; code: number } | null;
}
