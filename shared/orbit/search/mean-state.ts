import { SGP4_MU } from '../earth.ts';
import type { TemeState } from '../propagation.ts';
import { add, cross, dot, scale, unit, type Vector3 } from '../../vector.ts';
import { j2Periodics } from './j2-periodics.ts';

/** A state without its short-period terms: distance, speeds in the plane, and the directions of the plane. */
export interface MeanState {
  radiusKm: number;
  radialKmS: number;
  transverseKmS: number;
  outward: Vector3;
  ahead: Vector3;
  normal: Vector3;
}

/** Each turn shrinks the error by J2, a thousandth; the fourth is below a micrometre. */
const TURNS = 4;

function osculatingState(teme: TemeState): MeanState {
  const r: Vector3 = [teme.x, teme.y, teme.z];
  const v: Vector3 = [teme.vx, teme.vy, teme.vz];
  const outward = unit(r);
  const normal = unit(cross(r, v));
  const ahead = cross(normal, outward);
  return {
    radiusKm: dot(r, outward),
    radialKmS: dot(v, outward),
    transverseKmS: dot(v, ahead),
    outward,
    ahead,
    normal,
  };
}

/** Semi-latus rectum and the eccentricity vector along outward and ahead of a plane state. */
export function shapeOf(state: MeanState): {
  parameterKm: number;
  eccentricOutward: number;
  eccentricAhead: number;
} {
  const parameterKm = (state.radiusKm * state.transverseKmS) ** 2 / SGP4_MU;
  return {
    parameterKm,
    eccentricOutward: parameterKm / state.radiusKm - 1,
    eccentricAhead: -state.radialKmS * Math.sqrt(parameterKm / SGP4_MU),
  };
}

function withoutPeriodics(state: MeanState, guess: MeanState): MeanState {
  const { parameterKm, eccentricOutward, eccentricAhead } = shapeOf(guess);
  const periodics = j2Periodics({
    parameterKm,
    eccentricitySquared: eccentricOutward ** 2 + eccentricAhead ** 2,
    outwardZ: guess.outward[2],
    aheadZ: guess.ahead[2],
    normalZ: guess.normal[2],
  });
  const { towardsAhead, towardsNormal, twist } = periodics;
  const back = add(scale(state.ahead, -towardsAhead), scale(state.normal, -towardsNormal));
  const outward = unit(add(state.outward, back));
  const tilt = add(scale(state.outward, towardsNormal), scale(state.ahead, twist));
  const ahead = unit(cross(add(state.normal, tilt), outward));
  return {
    radiusKm: (state.radiusKm - periodics.radiusShiftKm) / periodics.radiusFactor,
    radialKmS: state.radialKmS - periodics.radialKmS,
    transverseKmS: state.transverseKmS - periodics.transverseKmS,
    outward,
    ahead,
    normal: cross(outward, ahead),
  };
}

/** The mean state whose short-period terms make up an SGP4 state: the inverse of them, by fixed-point turns. */
export function meanStateOf(teme: TemeState): MeanState {
  const state = osculatingState(teme);
  let mean = state;
  for (let turn = 0; turn < TURNS; turn++) mean = withoutPeriodics(state, mean);
  return mean;
}
