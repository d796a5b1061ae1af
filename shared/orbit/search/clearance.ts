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

export function clearanceOf(profile: MaskProfile, state: HorizonState): Clearance {
  const { eastKm, northKm, upKm, upKmS } = state;
  const acrossKm = Math.sqrt(eastKm * eastKm + northKm * northKm);
  const acrossKmS = (eastKm * state.eastKmS + northKm * state.northKmS) / acrossKm;
  const azimuth = profile.isUniform ? 0 : Math.atan2(eastKm, northKm);
  const { elevation, slope } = maskAt(profile, azimuth);
  const [sin, cos] = [Math.sin(elevation), Math.cos(elevation)];
  const km = upKm * cos - acrossKm * sin;
  const straight = upKmS * cos - acrossKmS * sin;
  if (slope === 0) return { km, kmS: straight };
  const azimuthRate = (northKm * state.eastKmS - eastKm * state.northKmS) / (acrossKm * acrossKm);
  return { km, kmS: straight - (upKm * sin + acrossKm * cos) * slope * azimuthRate };
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
