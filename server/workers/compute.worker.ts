/**
 * Heavy geometry, run in worker threads by jobs/compute-pool.ts. Pure functions on plain data; no database here.
 */
import type { Observer } from '../../shared/orbit/observer.ts';
import { makeTrack } from '../../shared/orbit/make-track.ts';
import {
  searchPasses,
  type HorizonMask,
  type PredictedPass,
} from '../../shared/orbit/pass-search.ts';
import type { Track } from '../../shared/orbit/track.ts';
import { openPasses, type OpenPassReasons } from '../../shared/schedule/reasons/open-passes.ts';
import { makeFacts } from '../../shared/schedule/facts/make-facts.ts';
import type { ContactModel, DayModel, Facts, Violation } from '../../shared/schedule/model.ts';
import { DAY_MS, HOUR_MS, dayStart } from '../../shared/time.ts';
import { verifyPlan } from '../verify/verify-plan.ts';

export interface PredictInput {
  line1: string;
  line2: string;
  observer: Observer;
  mask: HorizonMask;
  fromMs: number;
  toMs: number;
}
export interface PassWithTrack extends PredictedPass {
  track: Track;
}
export interface PredictOutput {
  passes: PassWithTrack[];
  sgp4Calls: number;
  orbitEnd: { atMs: number; code: number } | null;
}

/** Visibility longer than this is continuous: no low or medium orbit keeps a station's sky so long. */
const CONTINUOUS_MS = 12 * HOUR_MS;

/** Continuous visibility is cut at 00:00 UTC (DESIGN section 2); a pass across midnight stays whole. */
const cutAtMidnight = (input: PredictInput, pass: PredictedPass): PredictedPass[] => {
  if (pass.losMs - pass.aosMs <= CONTINUOUS_MS) return [pass];
  const pieces: PredictedPass[] = [];
  for (let fromMs = pass.aosMs; fromMs < pass.losMs;) {
    const toMs = Math.min(pass.losMs, dayStart(fromMs) + DAY_MS);
    const piece = searchPasses({ ...searchOf(input), fromMs, toMs }).passes[0];
    if (piece) pieces.push(piece);
    fromMs = toMs;
  }
  return pieces;
};

const searchOf = ({ line1, line2, observer, mask }: PredictInput) => ({
  elements: { line1, line2 },
  observer,
  mask,
});

/** All passes of one satellite whose AOS lies in [fromMs, toMs), with their tracks. */
export const predictPasses = (input: PredictInput): PredictOutput => {
  // Half a day more on both sides: a pass at the edge of the window is found whole, whenever it is asked for.
  const found = searchPasses({
    ...searchOf(input),
    fromMs: input.fromMs - CONTINUOUS_MS,
    toMs: input.toMs + CONTINUOUS_MS,
  });
  const passes = found.passes
    .flatMap((pass) => cutAtMidnight(input, pass))
    .filter((pass) => input.fromMs <= pass.aosMs && pass.aosMs < input.toMs)
    .map((pass) => ({
      ...pass,
      track: makeTrack(
        { line1: input.line1, line2: input.line2 },
        input.observer,
        pass.aosMs,
        pass.losMs,
      ),
    }));
  return { passes, sgp4Calls: found.sgp4Calls, orbitEnd: found.orbitEnd };
};

export const computeFacts = (day: DayModel): Facts => makeFacts(day);

export const verify = (input: { day: DayModel; contacts: ContactModel[] }): Violation[] =>
  verifyPlan(input.day, input.contacts);

export const findReasons = (input: {
  day: DayModel;
  facts: Facts;
  contacts: ContactModel[];
}): OpenPassReasons[] => openPasses(input.day, input.facts, input.contacts);
