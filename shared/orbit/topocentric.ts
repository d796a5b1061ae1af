import { EARTH_ROTATION_RAD_S } from './earth.ts';
import type { HorizonFrame } from './observer.ts';
import { meanSiderealTime, ut1Of } from './sidereal-time.ts';
import type { HorizonState } from './track.ts';

/** Position (km) and velocity (km/s) in inertial axes about the Earth's axis. */
export interface InertialState {
  x: number;
  y: number;
  z: number;
  vx: number;
  vy: number;
  vz: number;
}

/**
 * An inertial state seen from an observer: turned by Greenwich mean sidereal time into the Earth-fixed frame, then into
 * east, north, up. `driftRad` is how far the axes of the state lie ahead of TEME. Polar motion (below 0.0016 deg on the
 * sky of a LEO), light time and refraction are left out.
 */
export function toHorizon(
  state: InertialState,
  frame: HorizonFrame,
  utcMs: number,
  driftRad = 0,
): HorizonState {
  const angle = meanSiderealTime(ut1Of(utcMs, frame.ut1MinusUtcSeconds)) - driftRad;
  const [sinAngle, cosAngle] = [Math.sin(angle), Math.cos(angle)];
  // The meridian of the observer: `out` away from the axis in it, `east` across it.
  const cos = cosAngle * frame.cosLongitude - sinAngle * frame.sinLongitude;
  const sin = sinAngle * frame.cosLongitude + cosAngle * frame.sinLongitude;
  const out = state.x * cos + state.y * sin;
  const east = state.y * cos - state.x * sin;
  const outRate = state.vx * cos + state.vy * sin + EARTH_ROTATION_RAD_S * east;
  const eastRate = state.vy * cos - state.vx * sin - EARTH_ROTATION_RAD_S * out;
  const [dOut, dZ] = [out - frame.axisDistanceKm, state.z - frame.zKm];
  return {
    eastKm: east,
    northKm: frame.cosLatitude * dZ - frame.sinLatitude * dOut,
    upKm: frame.cosLatitude * dOut + frame.sinLatitude * dZ,
    eastKmS: eastRate,
    northKmS: frame.cosLatitude * state.vz - frame.sinLatitude * outRate,
    upKmS: frame.cosLatitude * outRate + frame.sinLatitude * state.vz,
  };
}
