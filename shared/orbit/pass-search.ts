import { toDegrees, wrapDegrees } from '../units.ts';
import { maskAt, maskProfile } from './horizon-mask.ts';
import { horizonFrame } from './observer.ts';
import { checkOrbit } from './orbit-checks.ts';
import type { PassQuery, PassSearchResult, PredictedPass } from './pass.ts';
import { checkPassQuery } from './pass-query.ts';
import { failureCode, makeOrbit, propagate } from './propagation.ts';
import { toHorizon } from './topocentric.ts';
import { lookAnglesOf, type LookAngles } from './track.ts';

export type { HorizonMask, PassQuery, PassSearchResult, PredictedPass } from './pass.ts';

const STEP_MS = 10_000;

/** Interim: dense scan with bisection. */
export function searchPasses(query: PassQuery): PassSearchResult {
  checkPassQuery(query);
  const orbit = makeOrbit(query.elements);
  checkOrbit(orbit, query.fromMs, query.toMs);
  const frame = horizonFrame(query.observer);
  const profile = maskProfile(query.mask);
  const look = (ms: number): LookAngles | null => {
    const teme = propagate(orbit, ms);
    return teme && lookAnglesOf(toHorizon(teme, frame, ms));
  };
  const clearance = (at: LookAngles): number =>
    at.elevationDeg -
    toDegrees(maskAt(profile, (wrapDegrees(at.azimuthDeg) * Math.PI) / 180).elevation);
  const value = (ms: number): number => {
    const at = look(ms);
    return at ? clearance(at) : -90;
  };
  const elevation = (ms: number): number => look(ms)?.elevationDeg ?? -90;
  const peak = (f: (ms: number) => number, a: number, b: number): number => {
    let [low, high] = [a, b];
    for (let i = 0; i < 60; i++) {
      const third = (high - low) / 3;
      if (f(low + third) < f(high - third)) low += third;
      else high -= third;
    }
    return (low + high) / 2;
  };
  const cross = (above: number, below: number): number => {
    let [a, b] = [above, below];
    for (let i = 0; i < 40; i++) {
      const middle = (a + b) / 2;
      if (value(middle) >= 0) a = middle;
      else b = middle;
    }
    return a;
  };
  const steps = Math.max(2, Math.ceil((query.toMs - query.fromMs) / STEP_MS));
  const times: number[] = [];
  let orbitEnd: PassSearchResult['orbitEnd'] = null;
  for (let i = 0; i <= steps; i++) {
    const ms = query.fromMs + ((query.toMs - query.fromMs) * i) / steps;
    if (!propagate(orbit, ms)) {
      orbitEnd = { atMs: ms, code: failureCode(orbit) };
      break;
    }
    times.push(ms);
  }
  const samples: [number, number][] = times.map((ms) => [ms, value(ms)]);
  for (let i = 1; i + 1 < times.length; i++) {
    const [a, b, c] = [samples[i - 1], samples[i], samples[i + 1]];
    if (!a || !b || !c) continue;
    if (b[1] < 0 && b[1] >= a[1] && b[1] >= c[1] && b[1] > -3) {
      const ms = peak(value, a[0], c[0]);
      const v = value(ms);
      if (v >= 0) samples.push([ms, v]);
    }
  }
  samples.sort((a, b) => a[0] - b[0]);
  const passes: PredictedPass[] = [];
  let opened: { aosMs: number; startsBefore: boolean; top: [number, number] } | null = null;
  const close = (losMs: number, endsAfter: boolean): void => {
    if (!opened) return;
    const { aosMs, startsBefore, top } = opened;
    const tcaMs = peak(
      elevation,
      Math.max(aosMs, top[0] - STEP_MS),
      Math.min(losMs, top[0] + STEP_MS),
    );
    const [aos, tca, los] = [look(aosMs), look(tcaMs), look(losMs)];
    opened = null;
    if (!aos || !tca || !los) return;
    passes.push({
      aosMs,
      tcaMs,
      losMs,
      maxElevationDeg: tca.elevationDeg,
      aosAzimuthDeg: aos.azimuthDeg,
      tcaAzimuthDeg: tca.azimuthDeg,
      losAzimuthDeg: los.azimuthDeg,
      tcaRangeKm: tca.rangeKm,
      startsBefore,
      endsAfter,
    });
  };
  for (const [i, sample] of samples.entries()) {
    const before = samples[i - 1];
    if (sample[1] >= 0) {
      const top: [number, number] = [sample[0], elevation(sample[0])];
      if (!opened)
        opened = {
          aosMs: before ? cross(sample[0], before[0]) : sample[0],
          startsBefore: !before,
          top,
        };
      else if (top[1] > opened.top[1]) opened.top = top;
    } else if (before && opened) close(cross(before[0], sample[0]), false);
  }
  close(times.at(-1) ?? query.toMs, true);
  return { passes, sgp4Calls: orbit.sgp4Calls, guardViolations: 0, orbitEnd };
}
