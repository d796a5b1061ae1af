/**
 * Time. Instants are milliseconds of UTC since 1970-01-01 (POSIX: no leap seconds), integers in the database and
 * the API, floats where an exact crossing is kept. All intervals are half-open: [fromMs, toMs).
 */

export const SECOND_MS = 1000;
export const MINUTE_MS = 60_000;
export const HOUR_MS = 3_600_000;
export const DAY_MS = 86_400_000;

export interface Interval {
  fromMs: number;
  toMs: number;
}

/** RFC 3339 UTC with milliseconds. */
export const toIso = (ms: number): string => new Date(Math.round(ms)).toISOString();
export const fromIso = (iso: string): number => Date.parse(iso);

/** First millisecond of the UTC day that holds the instant. */
export const dayStart = (ms: number): number => Math.floor(ms / DAY_MS) * DAY_MS;
/** `2026-12-02` of an instant. */
export const dayOf = (ms: number): string => toIso(ms).slice(0, 10);
/** The UTC day `2026-12-02` as an interval. */
export const dayInterval = (day: string): Interval => {
  const fromMs = Date.parse(`${day}T00:00:00.000Z`);
  return { fromMs, toMs: fromMs + DAY_MS };
};
/** Day of year, 1 January = 1. */
export const dayOfYear = (ms: number): number =>
  Math.floor((ms - Date.UTC(new Date(ms).getUTCFullYear(), 0, 1)) / DAY_MS) + 1;

export const overlaps = (a: Interval, b: Interval): boolean =>
  a.fromMs < b.toMs && b.fromMs < a.toMs;
export const contains = (outer: Interval, inner: Interval): boolean =>
  outer.fromMs <= inner.fromMs && inner.toMs <= outer.toMs;
/** The common part, or null when there is none. */
export const intersect = (a: Interval, b: Interval): Interval | null => {
  const fromMs = Math.max(a.fromMs, b.fromMs);
  const toMs = Math.min(a.toMs, b.toMs);
  return fromMs < toMs ? { fromMs, toMs } : null;
};
/** Rounded to whole seconds inside the interval; null when nothing is left. */
export const roundInward = (interval: Interval): Interval | null => {
  const fromMs = Math.ceil(interval.fromMs / SECOND_MS) * SECOND_MS;
  const toMs = Math.floor(interval.toMs / SECOND_MS) * SECOND_MS;
  return fromMs < toMs ? { fromMs, toMs } : null;
};
