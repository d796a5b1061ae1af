/**
 * The brute-force truth for the pass search: SGP4 once a second, every sign change bisected, every turn near the mask
 * searched by golden section. It shares SGP4 and the horizon frame with the product (held against outside references in
 * `sgp4-verification.test.ts` and `reference-passes.test.ts`), but nothing of the search.
 */
import { horizonFrame, type HorizonFrame, type Observer } from '../../shared/orbit/observer.ts';
import {
  makeOrbit,
  propagate,
  type ElementLines,
  type Orbit,
} from '../../shared/orbit/propagation.ts';
import { toHorizon } from '../../shared/orbit/topocentric.ts';
import type { HorizonMask } from '../../shared/orbit/pass-search.ts';

export interface DensePass {
  aosMs: number;
  losMs: number;
  maxElevationDeg: number;
}

const STEP_MS = 1000;
const DEGREES = 180 / Math.PI;
/** A turn further than this from the mask cannot reach it within a second. */
const NEAR_DEG = 0.1;

/** Elevation of a mask by azimuth, looked up in the plainest way: a table of whole knots around the circle, twice. */
function maskLookup(mask: HorizonMask): (azimuthDeg: number) => number {
  if (typeof mask === 'number') return () => mask;
  const around = [...mask, ...mask.map(([a, e]) => [a + 360, e] as const)];
  return (azimuthDeg) => {
    const azimuth = azimuthDeg < (mask[0]?.[0] ?? 0) ? azimuthDeg + 360 : azimuthDeg;
    const index = around.findIndex(([a]) => a > azimuth);
    const [a0, e0] = around[index - 1] ?? [0, 0];
    const [a1, e1] = around[index] ?? [0, 0];
    return e0 + ((e1 - e0) * (azimuth - a0)) / (a1 - a0);
  };
}

interface Look {
  azimuthDeg: number;
  elevationDeg: number;
}

function lookAt(orbit: Orbit, frame: HorizonFrame, ms: number): Look | null {
  const teme = propagate(orbit, ms);
  if (!teme) return null;
  const { eastKm, northKm, upKm } = toHorizon(teme, frame, ms);
  return {
    azimuthDeg: (Math.atan2(eastKm, northKm) * DEGREES + 360) % 360,
    elevationDeg: Math.atan2(upKm, Math.hypot(eastKm, northKm)) * DEGREES,
  };
}

function bisect(f: (ms: number) => number, aboveMs: number, belowMs: number): number {
  let [above, below] = [aboveMs, belowMs];
  while (Math.abs(above - below) > 0.001) {
    const middle = (above + below) / 2;
    if (f(middle) >= 0) above = middle;
    else below = middle;
  }
  return above;
}

/** Place of the largest value of sign x f by golden section. */
function turn(f: (ms: number) => number, sign: number, fromMs: number, toMs: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [fromMs, toMs];
  while (b - a > 0.01) {
    const [c, d] = [b - ratio * (b - a), a + ratio * (b - a)];
    if (sign * f(c) >= sign * f(d)) b = d;
    else a = c;
  }
  return (a + b) / 2;
}

/** Look angles once a second, shared by all masks of a station. */
export function denseLooks(
  elements: ElementLines,
  observers: readonly Observer[],
  fromMs: number,
  toMs: number,
): { orbit: Orbit; stations: { frame: HorizonFrame; looks: Look[] }[]; fromMs: number } {
  const orbit = makeOrbit(elements);
  const stations = observers.map((observer) => ({
    frame: horizonFrame(observer),
    looks: [] as Look[],
  }));
  for (let ms = fromMs; ms <= toMs; ms += STEP_MS) {
    const teme = propagate(orbit, ms);
    if (!teme) break;
    for (const { frame, looks } of stations) {
      const { eastKm, northKm, upKm } = toHorizon(teme, frame, ms);
      looks.push({
        azimuthDeg: (Math.atan2(eastKm, northKm) * DEGREES + 360) % 360,
        elevationDeg: Math.atan2(upKm, Math.hypot(eastKm, northKm)) * DEGREES,
      });
    }
  }
  return { orbit, stations, fromMs };
}

/** The passes above a mask, from the looks of a station. */
export function densePasses(
  scan: ReturnType<typeof denseLooks>,
  station: number,
  mask: HorizonMask,
): DensePass[] {
  const { orbit, stations, fromMs } = scan;
  const view = stations[station];
  if (!view) return [];
  const { frame, looks } = view;
  const maskAt = maskLookup(mask);
  const value = (ms: number): number => {
    const look = lookAt(orbit, frame, ms);
    return look ? look.elevationDeg - maskAt(look.azimuthDeg) : -90;
  };
  const elevation = (ms: number): number => lookAt(orbit, frame, ms)?.elevationDeg ?? -90;
  const samples: [number, number][] = [];
  const plain = looks.map((look) => look.elevationDeg - maskAt(look.azimuthDeg));
  for (const [index, at] of plain.entries()) {
    const ms = fromMs + index * STEP_MS;
    const [before, after] = [plain[index - 1], plain[index + 1]];
    samples.push([ms, at]);
    if (before === undefined || after === undefined) continue;
    const sign = at < 0 ? 1 : -1;
    // A turn towards the mask that the samples do not reach.
    if (sign * (at - before) < 0 || sign * (at - after) < 0) continue;
    const reach = Math.max(NEAR_DEG, Math.abs(at - before), Math.abs(at - after));
    if (Math.abs(at) > reach) continue;
    const turnMs = turn(value, sign, ms - STEP_MS, ms + STEP_MS);
    samples.push([turnMs, value(turnMs)]);
  }
  samples.sort((a, b) => a[0] - b[0]);
  const passes: DensePass[] = [];
  let open: { aosMs: number; top: number } | null = null;
  const close = (losMs: number): void => {
    if (!open) return;
    const { aosMs, top } = open;
    const peakMs = turn(
      elevation,
      1,
      Math.max(aosMs, top - STEP_MS),
      Math.min(losMs, top + STEP_MS),
    );
    const heights = [aosMs, losMs, peakMs].map(elevation);
    passes.push({ aosMs, losMs, maxElevationDeg: Math.max(...heights) });
    open = null;
  };
  let topElevation = -90;
  for (const [index, [ms, at]] of samples.entries()) {
    const before = samples[index - 1];
    if (at >= 0) {
      if (!open) {
        open = { aosMs: before ? bisect(value, ms, before[0]) : ms, top: ms };
        topElevation = -90;
      }
      const look = looks[Math.round((ms - fromMs) / STEP_MS)];
      if (look && look.elevationDeg > topElevation) {
        topElevation = look.elevationDeg;
        open.top = ms;
      }
    } else if (open && before) close(bisect(value, before[0], ms));
  }
  close(samples.at(-1)?.[0] ?? fromMs);
  return passes;
}
