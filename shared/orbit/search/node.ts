import { EARTH_ROTATION_RAD_S, SGP4_EARTH_RADIUS_KM, SGP4_J2, SGP4_MU } from '../earth.ts';
import type { HorizonFrame } from '../observer.ts';
import { toHorizon, type InertialState } from '../topocentric.ts';
import type { HorizonState } from '../track.ts';

/** Where the satellite is for the observer at an instant, with velocity and acceleration. */
export interface Node extends HorizonState {
  atMs: number;
  eastKmS2: number;
  northKmS2: number;
  upKmS2: number;
}

/** J2 gravity and the terms of the turning frame, in the observer's meridian: outward from the axis, east, north. */
function meridianAcceleration(state: HorizonState, frame: HorizonFrame): [number, number, number] {
  const { sinLatitude, cosLatitude } = frame;
  const out = frame.axisDistanceKm + cosLatitude * state.upKm - sinLatitude * state.northKm;
  const z = frame.zKm + sinLatitude * state.upKm + cosLatitude * state.northKm;
  const outRate = cosLatitude * state.upKmS - sinLatitude * state.northKmS;
  const squared = out * out + state.eastKm * state.eastKm + z * z;
  const gravity = -SGP4_MU / (squared * Math.sqrt(squared));
  const j2 = (1.5 * SGP4_J2 * SGP4_EARTH_RADIUS_KM ** 2) / squared;
  const latitudeTerm = (5 * z * z) / squared;
  const equatorial = gravity * (1 + j2 * (1 - latitudeTerm));
  const w = EARTH_ROTATION_RAD_S;
  return [
    equatorial * out + 2 * w * state.eastKmS + w * w * out,
    equatorial * state.eastKm - 2 * w * outRate + w * w * state.eastKm,
    gravity * (1 + j2 * (3 - latitudeTerm)) * z,
  ];
}

/** The node of a state in the observer's frame. */
export function nodeOf(state: HorizonState, frame: HorizonFrame, atMs: number): Node {
  const [out, east, z] = meridianAcceleration(state, frame);
  return {
    atMs,
    eastKm: state.eastKm,
    northKm: state.northKm,
    upKm: state.upKm,
    eastKmS: state.eastKmS,
    northKmS: state.northKmS,
    upKmS: state.upKmS,
    eastKmS2: east,
    northKmS2: frame.cosLatitude * z - frame.sinLatitude * out,
    upKmS2: frame.cosLatitude * out + frame.sinLatitude * z,
  };
}

/** The node of an inertial state; `driftRad` as in `toHorizon`. */
export const inertialNode = (
  state: InertialState,
  frame: HorizonFrame,
  atMs: number,
  driftRad = 0,
): Node => nodeOf(toHorizon(state, frame, atMs, driftRad), frame, atMs);

/** The node moved by a few seconds with its acceleration; the error is jerk x t^3 / 6 (LEO: 1.4 mm after 1 s). */
export function moved(node: Node, frame: HorizonFrame, seconds: number): Node {
  const half = seconds / 2;
  const state: HorizonState = {
    eastKm: node.eastKm + seconds * (node.eastKmS + half * node.eastKmS2),
    northKm: node.northKm + seconds * (node.northKmS + half * node.northKmS2),
    upKm: node.upKm + seconds * (node.upKmS + half * node.upKmS2),
    eastKmS: node.eastKmS + seconds * node.eastKmS2,
    northKmS: node.northKmS + seconds * node.northKmS2,
    upKmS: node.upKmS + seconds * node.upKmS2,
  };
  return nodeOf(state, frame, node.atMs + seconds * 1000);
}
