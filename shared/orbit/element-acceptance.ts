import { DAY_MS } from '../time.ts';
import type { ReadElementSet } from './element-set.ts';
import { failureCode, makeOrbit, propagate } from './propagation.ts';

export interface AcceptanceOptions {
  /** Days the element set must serve, counted from now; the trial propagation is made at both ends. */
  windowDays: number;
  /** Older sets are refused. */
  oldestDays: number;
  /** Sets with an epoch further in the future are refused. */
  furthestAheadDays: number;
}

/** Element sets serve about two weeks (common practice); 60 days leave room for high orbits. */
export const DEFAULT_ACCEPTANCE: AcceptanceOptions = {
  windowDays: 10,
  oldestDays: 60,
  furthestAheadDays: 15,
};

export interface AcceptanceFault {
  code: 'EPOCH_TOO_OLD' | 'EPOCH_TOO_FAR_AHEAD' | 'PROPAGATION_FAILED';
  reason: string;
}

function ageFault(ageDays: number, options: AcceptanceOptions): AcceptanceFault | null {
  const days = Math.abs(ageDays).toFixed(1);
  if (ageDays > options.oldestDays) {
    const reason = `The epoch is ${days} days old; at most ${options.oldestDays} days are accepted. Load a newer set.`;
    return { code: 'EPOCH_TOO_OLD', reason };
  }
  if (-ageDays > options.furthestAheadDays) {
    const reason = `The epoch lies ${days} days ahead; at most ${options.furthestAheadDays} days are accepted. Check its date.`;
    return { code: 'EPOCH_TOO_FAR_AHEAD', reason };
  }
  return null;
}

/**
 * Whether a set that was read can be used now: its age (which also bounds what a deep-space call costs) and finite SGP4
 * positions at the ends of the window it must serve. Null when all is well.
 */
export function judgeTrialPropagation(
  set: ReadElementSet,
  nowMs: number,
  options: Partial<AcceptanceOptions> = {},
): AcceptanceFault | null {
  const settings = { ...DEFAULT_ACCEPTANCE, ...options };
  const tooFar = ageFault((nowMs - set.epochMs) / DAY_MS, settings);
  if (tooFar) return tooFar;
  const orbit = makeOrbit(set);
  for (const ms of [set.epochMs, nowMs, nowMs + settings.windowDays * DAY_MS]) {
    if (propagate(orbit, ms)) continue;
    const day = ((ms - set.epochMs) / DAY_MS).toFixed(1);
    const reason = `SGP4 gives no position ${day} days after the epoch (code ${failureCode(orbit)}): the orbit decays or the elements are wrong.`;
    return { code: 'PROPAGATION_FAILED', reason };
  }
  return null;
}
