import type { ContactModel, DayModel, Violation } from '../../shared/schedule/model.ts';
import { checkBeams } from './check-beams.ts';
import { checkChannels } from './check-channels.ts';
import { checkService } from './check-service.ts';
import { checkSight } from './check-sight.ts';
import { suspects } from './legs.ts';

/**
 * Judges a plan again without facts and rules: from tracks, station and faces alone, every second and at every leg's
 * ends. An empty answer confirms the plan; guard time is measured to 1 s, conflicts shorter than a second can escape.
 */
export function verifyPlan(day: DayModel, contacts: readonly ContactModel[]): Violation[] {
  const legs = suspects(day, contacts);
  return [
    ...checkSight(day, legs),
    ...checkChannels(day, legs),
    ...checkBeams(legs),
    ...checkService(day, legs),
  ].sort((a, b) => a.fromMs - b.fromMs);
}
