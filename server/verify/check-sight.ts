import type { DayModel, Violation } from '../../shared/schedule/model.ts';
import { finding } from './finding.ts';
import type { Suspect } from './legs.ts';
import { sightOf, type Sight } from './sky-check.ts';

/** Sampling sees the end of a window only to the second; used where guard time is counted from it. */
const STEP_MS = 1000;

/** Every whole second of a span, and its ends. */
export function secondsOf(fromMs: number, toMs: number): number[] {
  const times = [fromMs];
  for (let ms = (Math.floor(fromMs / STEP_MS) + 1) * STEP_MS; ms < toMs; ms += STEP_MS)
    times.push(ms);
  if (toMs > fromMs) times.push(toMs);
  return times;
}

/** Longest stretches of samples that hold, as [first, last]. */
function runs(times: readonly number[], holds: (ms: number) => boolean): [number, number][] {
  const found: [number, number][] = [];
  let open: [number, number] | null = null;
  for (const ms of times) {
    if (!holds(ms)) open = null;
    else if (open) open[1] = ms;
    else found.push((open = [ms, ms]));
  }
  return found;
}

/** The leg lies in one stretch in which the condition holds; a receive leg may overhang it by the guard time. */
function liesWithin(
  suspect: Suspect,
  day: DayModel,
  condition: (sight: Sight) => boolean,
  clipToPass: boolean,
): boolean {
  const { leg, pass, face, satellite, direction } = suspect;
  if (!pass || !face || !satellite) return false;
  const seconds = satellite.guardTimeSeconds ?? day.station.guardTimeSeconds;
  const guardMs = direction === 'receive' ? seconds * 1000 : 0;
  const fromMs = clipToPass ? Math.max(leg.fromMs, pass.fromMs) : leg.fromMs;
  const toMs = clipToPass ? Math.min(leg.toMs, pass.toMs) : leg.toMs;
  if (fromMs >= toMs) return clipToPass;
  const times = secondsOf(
    Math.max(pass.fromMs, fromMs - guardMs),
    Math.min(pass.toMs, toMs + guardMs),
  );
  const tolerance = guardMs > 0 ? guardMs + STEP_MS : 0;
  const sightAt = sightOf(day, { pass, face, satellite, direction });
  return runs(times, (ms) => condition(sightAt(ms))).some(
    ([first, last]) => first - tolerance <= fromMs && toMs <= last + tolerance,
  );
}

/** Each leg in sight of its face, second by second; the uplink inside its downlink; nothing beyond a hard end. */
export function checkSight(day: DayModel, suspects: readonly Suspect[]): Violation[] {
  const found: Violation[] = [];
  for (const suspect of suspects) {
    if (!suspect.own) continue;
    const { leg, contact, direction } = suspect;
    const report = (rule: 'outside-window' | 'hard-end', words: string): void => {
      found.push(finding(rule, words, [suspect], leg.fromMs, leg.toMs));
    };
    if (!liesWithin(suspect, day, ({ usable }) => usable, false))
      report('outside-window', 'not in a usable window all the time');
    if (suspect.pass && !liesWithin(suspect, day, ({ withinHardEnd }) => withinHardEnd, true))
      report('hard-end', 'beyond the hard end of the face');
    const { receive } = contact;
    if (direction === 'transmit' && (leg.fromMs < receive.fromMs || leg.toMs > receive.toMs))
      report('outside-window', 'not inside its downlink');
  }
  return found;
}
