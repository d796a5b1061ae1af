import { EARTH_ROTATION_RAD_S } from './earth.ts';
import type { HorizonFrame } from './observer.ts';
import type { TemeState } from './propagation.ts';
import { meanSiderealTime, ut1Of } from './sidereal-time.ts';
import type { HorizonState } from './track.ts';

/**
 * A TEME state seen from an observer: turned by Greenwich mean sidereal time into the Earth-fixed frame, then into
 * east, north, up. Polar motion (below 0.0016 deg on the sky of a LEO), light time and refraction are left out.
 */
export function toHorizon(teme: TemeState, frame: HorizonFrame, utcMs: number): HorizonState {
  const { position: r, velocity: v } = teme;
  const gmst = meanSiderealTime(ut1Of(utcMs, frame.ut1MinusUtcSeconds));
  const [sinGmst, cosGmst] = [Math.sin(gmst), Math.cos(gmst)];
  // The meridian of the observer: `out` away from the axis in it, `east` across it.
  const cos = cosGmst * frame.cosLongitude - sinGmst * frame.sinLongitude;
  const sin = sinGmst * frame.cosLongitude + cosGmst * frame.sinLongitude;
  const out = r.x * cos + r.y * sin;
  const east = r.y * cos - r.x * sin;
  const outRate = v.x * cos + v.y * sin + EARTH_ROTATION_RAD_S * east;
  const eastRate = v.y * cos - v.x * sin - EARTH_ROTATION_RAD_S * out;
  const [dOut, dZ] = [out - frame.axisDistanceKm, r.z - frame.zKm];
  return {
    eastKm: east,
    northKm: frame.cosLatitude * dZ - frame.sinLatitude * dOut,
    upKm: frame.cosLatitude * dOut + frame.sinLatitude * dZ,
    eastKmS: eastRate,
    northKmS: frame.cosLatitude * v.z - frame.sinLatitude * outRate,
    upKmS: frame.cosLatitude * outRate + frame.sinLatitude * v.z,
  };
}
