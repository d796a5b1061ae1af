import { dayStart, HOUR_MS } from '../../time.ts';
import type { RequirementModel } from '../model.ts';

/** ISO weekday of an instant's UTC day, Monday 1 to Sunday 7. */
export const isoWeekday = (ms: number): number => new Date(ms).getUTCDay() || 7;

/** The line asks something of the UTC day that holds the instant. */
export const asksOn = (line: Pick<RequirementModel, 'weekdays'>, ms: number): boolean =>
  line.weekdays === null || line.weekdays.includes(isoWeekday(ms));

/** A contact that begins at the instant lies in the hours and weekdays of the line. Hours may pass midnight. */
export function inHours(
  line: Pick<RequirementModel, 'weekdays' | 'hoursUtc'>,
  ms: number,
): boolean {
  if (!asksOn(line, ms)) return false;
  if (line.hoursUtc === null) return true;
  const [from, to] = line.hoursUtc;
  const hour = (ms - dayStart(ms)) / HOUR_MS;
  return from <= to ? hour >= from && hour < to : hour >= from || hour < to;
}
