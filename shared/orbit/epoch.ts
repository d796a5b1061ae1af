import { DAY_MS } from '../time.ts';

/** Two-digit years below this belong to this century (convention of the two-line form). */
const CENTURY_PIVOT = 57;

const fullYear = (twoDigitYear: number): number =>
  twoDigitYear < CENTURY_PIVOT ? 2000 + twoDigitYear : 1900 + twoDigitYear;

/** Instant of a two-line epoch, ms UTC: two-digit year and day of year, 1.0 = 1 January 00:00. Exact to 0.3 us. */
export const epochOf = (twoDigitYear: number, dayOfYear: number): number =>
  Date.UTC(fullYear(twoDigitYear), 0, 1) + (dayOfYear - 1) * DAY_MS;

/** Why the day does not exist in that year, or null. */
export function epochFault(twoDigitYear: number, dayOfYear: number): string | null {
  const year = fullYear(twoDigitYear);
  const days = (Date.UTC(year + 1, 0, 1) - Date.UTC(year, 0, 1)) / DAY_MS;
  if (dayOfYear >= 1 && dayOfYear < days + 1) return null;
  return `The epoch day ${dayOfYear} does not exist: ${year} has the days 1 to ${days}.`;
}
