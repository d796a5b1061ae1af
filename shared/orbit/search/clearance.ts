import { maskAt, type MaskProfile } from '../horizon-mask.ts';
import type { HorizonState } from '../track.ts';

/**
 * How far a position lies above the cone of the mask, km: range x sin(elevation - mask). It is zero where the elevation
 * equals the mask, and moves no faster than the position does, so a bound of the position bounds it too.
 */
export interface Clearance {
  km: number;
  kmS: number;
}

/** Keeps rates finite exactly at the zenith. */
const LEAST_ACROSS_KM = 1e-9;

export function clearanceOf(profile: MaskProfile, state: HorizonState): Clearance {
  const { eastKm, northKm, eastKmS, northKmS, upKm, upKmS } = state;
  const acrossKm = Math.sqrt(eastKm * eastKm + northKm * northKm) || LEAST_ACROSS_KM;
  const acrossKmS = (eastKm * eastKmS + northKm * northKmS) / acrossKm;
  if (profile.isUniform) {
    const { sinLowest, cosLowest } = profile;
    const km = upKm * cosLowest - acrossKm * sinLowest;
    return { km, kmS: upKmS * cosLowest - acrossKmS * sinLowest };
  }
  const { elevation, slope } = maskAt(profile, Math.atan2(eastKm, northKm));
  const [sin, cos] = [Math.sin(elevation), Math.cos(elevation)];
  const azimuthRate = (northKm * eastKmS - eastKm * northKmS) / (acrossKm * acrossKm);
  const turning = (upKm * sin + acrossKm * cos) * slope * azimuthRate;
  return { km: upKm * cos - acrossKm * sin, kmS: upKmS * cos - acrossKmS * sin - turning };
}

/**
 * Sign and zeros of the elevation rate: up-rate x across^2 - up x across x across-rate. Unlike the rate itself it stays
 * smooth through the zenith.
 */
export function climbOf(state: HorizonState): number {
  const { eastKm, northKm, upKm } = state;
  const acrossSquared = eastKm * eastKm + northKm * northKm;
  const acrossProduct = eastKm * state.eastKmS + northKm * state.northKmS;
  return state.upKmS * acrossSquared - upKm * acrossProduct;
}

export const elevationOf = ({ eastKm, northKm, upKm }: HorizonState): number =>
  Math.atan2(upKm, Math.hypot(eastKm, northKm));
