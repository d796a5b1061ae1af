import { planContext, type PlanContext } from '../context.ts';
import { makeFacts } from '../facts/make-facts.ts';
import { findWindows } from '../facts/windows.ts';
import type { ContactModel, DayModel, PassModel } from '../model.ts';
import { planLegs } from '../plan-legs.ts';
import { scanLossLimitDb } from '../scan-limits.ts';
import { decimals } from '../words.ts';
import { placeWords, type Freeing } from './freeing.ts';
import { holdsTogether, type Nearby } from './nearby.ts';
import { placeContact } from './placement.ts';

const STEP_DB = 0.1;

/** The day as it would be with a looser limit for everybody. */
const loosened = (day: DayModel, limitDb: number): DayModel => ({
  ...day,
  limitOfDayDb: limitDb,
  requirements: day.requirements.map((line) => ({ ...line, scanLossLimitDb: null })),
});

/** The pass placed under another limit, its conflicts not yet looked at. */
function placedAt(near: Nearby, pass: PassModel, limitDb: number): ContactModel | null {
  const day = { ...loosened(near.context.day, limitDb), passes: [pass] };
  const { windows, withinHardEnd } = findWindows(day);
  const own = planContext(day, { windows, withinHardEnd, conflicts: [] });
  const context: PlanContext = { ...near.context, windowsOf: own.windowsOf, conflictsOf: () => [] };
  return placeContact(context, { pass, legs: planLegs(near.context, near.contacts) });
}

/** With the conflicts of the wider windows: still placeable and no rule broken? */
function confirmed(near: Nearby, pass: PassModel, limitDb: number): ContactModel | null {
  const ids = new Set(
    [...near.contacts, ...near.context.day.neighbours].map(({ passId }) => passId),
  );
  const passes = near.context.day.passes.filter(({ id }) => id === pass.id || ids.has(id));
  const day = { ...loosened(near.context.day, limitDb), passes };
  const context = planContext(day, makeFacts(day));
  const placed = placeContact(context, { pass, legs: planLegs(context, near.contacts) });
  return placed && holdsTogether(context, [...near.contacts, placed]) ? placed : null;
}

/** The smallest raise of the limit of the day, in tenths of a dB and never beyond a hard end, that lets the pass on. */
export function raisedLimit(near: Nearby, pass: PassModel): Freeing | null {
  const { day } = near.context;
  const nowDb = scanLossLimitDb(day, pass.missionId);
  const hardDb = Math.max(...day.faces.map(({ hardEndDb }) => hardEndDb));
  const steps = Math.floor((hardDb - nowDb) / STEP_DB + 1e-9);
  const limitAt = (step: number): number => Math.round((nowDb + step * STEP_DB) * 1000) / 1000;
  if (steps < 1 || !placedAt(near, pass, limitAt(steps))) return null;
  let [fails, fits] = [0, steps];
  while (fits - fails > 1) {
    const middle = Math.floor((fails + fits) / 2);
    if (placedAt(near, pass, limitAt(middle))) fits = middle;
    else fails = middle;
  }
  const placed = confirmed(near, pass, limitAt(fits));
  if (!placed) return null;
  const words = `With the limit of the day up by ${decimals(fits * STEP_DB, 1)} dB, to ${decimals(limitAt(fits), 1)} dB, it fits ${placeWords(near.context, placed)}.`;
  return { kind: 'limit-of-day', words, costMinutes: 0, edits: [] };
}
