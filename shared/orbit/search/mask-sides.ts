import { clearanceOf } from './clearance.ts';
import { exactNode, type Search } from './exact.ts';
import type { Extreme } from './extremes.ts';
import { sampleAt, sampleTimes, type MaskSample } from './mask-samples.ts';
import { rootBetween } from './root.ts';
import { approximateState, type Run } from './run.ts';
import { runEnds, type Side } from './sides.ts';

/** Samples in a fine segment before azimuth and knots add theirs. */
const STEPS_IN_SEGMENT = 8;
const TIME_TOLERANCE_MS = 1;
/** Rates are taken this far inside a step: at its ends the mask may have a knot. */
const INSIDE_MS = 1;

function coarseTimes(run: Run, extremes: readonly Extreme[]): number[] {
  const times = extremes.map(({ ms }) => ms);
  for (let index = 0; index + 1 < run.nodes.length; index++) {
    const [fromMs, toMs] = [run.nodes[index]?.atMs ?? 0, run.nodes[index + 1]?.atMs ?? 0];
    for (let step = 0; step < STEPS_IN_SEGMENT; step++)
      times.push(fromMs + ((toMs - fromMs) * step) / STEPS_IN_SEGMENT);
  }
  times.push(run.nodes.at(-1)?.atMs ?? 0);
  return times.sort((a, b) => a - b);
}

/** The sample where the clearance turns between two samples, if its rate changes sign there. */
function turningSample(search: Search, run: Run, from: MaskSample, to: MaskSample): MaskSample[] {
  if (to.ms - from.ms < 4 * INSIDE_MS) return [];
  const rate = (ms: number): number => clearanceOf(search.profile, approximateState(run, ms)).kmS;
  const bracket = [from.ms + INSIDE_MS, to.ms - INSIDE_MS] as const;
  const rates = [rate(bracket[0]), rate(bracket[1])] as const;
  if (rates[0] < 0 === rates[1] < 0) return [];
  const ms = rootBetween(rate, bracket, rates, TIME_TOLERANCE_MS);
  return [sampleAt(search.profile, run, ms, search.guardKm)];
}

function samplesOf(search: Search, run: Run, extremes: readonly Extreme[]): MaskSample[] {
  const { profile, guardKm } = search;
  const times = sampleTimes(profile, run, coarseTimes(run, extremes));
  const samples: MaskSample[] = [];
  for (const ms of times) {
    const next = sampleAt(profile, run, ms, guardKm);
    const last = samples.at(-1);
    if (last) samples.push(...turningSample(search, run, last, next));
    samples.push(next);
  }
  return samples;
}

/** Uncertain samples matter only where the clearance turns: elsewhere the neighbours decide. */
function isTurn(samples: readonly MaskSample[], index: number): boolean {
  const [before, at, after] = [samples[index - 1], samples[index], samples[index + 1]];
  if (!before || !at || !after) return false;
  return (at.km - before.km) * (after.km - at.km) <= 0;
}

/** Sides under a mask with knots: close enough that the clearance crosses zero at most once between two of them. */
export function maskSides(search: Search, run: Run, extremes: readonly Extreme[]): Side[] {
  const samples = samplesOf(search, run, extremes);
  const [first, last] = runEnds(search, run);
  const inner = samples.flatMap((sample, index): Side[] => {
    if (index === 0 || index === samples.length - 1) return [];
    const { ms, km, uncertaintyKm } = sample;
    if (Math.abs(km) > uncertaintyKm) return [{ ms, isAbove: km > 0, correctionKm: 0 }];
    if (!isTurn(samples, index)) return [];
    const exactKm = clearanceOf(search.profile, exactNode(search, run, ms)).km;
    return [{ ms, isAbove: exactKm >= 0, correctionKm: exactKm - km }];
  });
  return [first, ...inner, last];
}
