import type { MaskProfile } from '../horizon-mask.ts';
import type { HorizonState } from '../track.ts';
import { clearanceOf } from './clearance.ts';
import { rootBetween } from './root.ts';
import { approximateState, type Run } from './run.ts';

/** Clearance of the approximation at an instant, and how far the guard reaches there. */
export interface MaskSample {
  ms: number;
  km: number;
  uncertaintyKm: number;
}

/** Azimuth turns by no more than this between two samples, or they lie this close, ms. */
const LARGEST_TURN_RAD = 0.35;
const CLOSEST_MS = 20;
const TIME_TOLERANCE_MS = 0.5;
const TURN_RAD = 2 * Math.PI;

const azimuthOf = ({ eastKm, northKm }: HorizonState): number => Math.atan2(eastKm, northKm);
const wrapped = (angle: number): number => angle - TURN_RAD * Math.round(angle / TURN_RAD);

export function sampleAt(profile: MaskProfile, run: Run, ms: number, guardKm: number): MaskSample {
  const state = approximateState(run, ms);
  const acrossKm = Math.hypot(state.eastKm, state.northKm);
  const rangeKm = Math.hypot(acrossKm, state.upKm);
  // A position error turns the azimuth too, and with it the mask.
  const uncertaintyKm = guardKm * (1 + (profile.steepestSlope * rangeKm) / acrossKm);
  return { ms, km: clearanceOf(profile, state).km, uncertaintyKm };
}

/** Knots of the mask whose azimuth is passed between two samples, as instants. */
function knotCrossings(profile: MaskProfile, run: Run, fromMs: number, toMs: number): number[] {
  const start = azimuthOf(approximateState(run, fromMs));
  const turn = wrapped(azimuthOf(approximateState(run, toMs)) - start);
  return profile.azimuthsRad.flatMap((knot) => {
    const ahead = wrapped(knot - start);
    if (ahead === 0 || ahead > 0 !== turn > 0 || Math.abs(ahead) > Math.abs(turn)) return [];
    const [sin, cos] = [Math.sin(knot), Math.cos(knot)];
    const beside = (ms: number): number => {
      const { eastKm, northKm } = approximateState(run, ms);
      return eastKm * cos - northKm * sin;
    };
    const ends = [beside(fromMs), beside(toMs)] as const;
    if (ends[0] < 0 === ends[1] < 0) return [];
    return [rootBetween(beside, [fromMs, toMs], ends, TIME_TOLERANCE_MS)];
  });
}

/** Halves a step until the azimuth turns little in it; instants after the first. */
function refinedStep(run: Run, fromMs: number, toMs: number): number[] {
  const turn = wrapped(
    azimuthOf(approximateState(run, toMs)) - azimuthOf(approximateState(run, fromMs)),
  );
  if (Math.abs(turn) <= LARGEST_TURN_RAD || toMs - fromMs <= CLOSEST_MS) return [toMs];
  const middleMs = (fromMs + toMs) / 2;
  return [...refinedStep(run, fromMs, middleMs), ...refinedStep(run, middleMs, toMs)];
}

/** Instants between which the mask under the satellite is linear in azimuth and the azimuth turns little. */
export function sampleTimes(profile: MaskProfile, run: Run, coarse: readonly number[]): number[] {
  const times: number[] = coarse.slice(0, 1);
  for (let index = 1; index < coarse.length; index++) {
    const [fromMs, toMs] = [coarse[index - 1] ?? 0, coarse[index] ?? 0];
    let lastMs = fromMs;
    for (const ms of refinedStep(run, fromMs, toMs)) {
      times.push(...knotCrossings(profile, run, lastMs, ms).sort((a, b) => a - b), ms);
      lastMs = ms;
    }
  }
  return times;
}
