import type { DayModel, Facts } from '../model.ts';
import { findConflicts } from './conflicts.ts';
import { findWindows } from './windows.ts';

/**
 * What physics and station allow on a day: usable windows, pairs too close, parts within the hard ends. Exact crossings
 * (0.02 ms on the given tracks). The same day gives the same facts; they depend on no plan.
 */
export function makeFacts(day: DayModel): Facts {
  const { windows, withinHardEnd } = findWindows(day);
  return { windows, conflicts: findConflicts(day, windows), withinHardEnd };
}
