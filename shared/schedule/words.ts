import { SECOND_MS, type Interval } from '../time.ts';

/** `06:14:10` of an instant, UTC; rounded to the nearest second. */
export const clock = (ms: number): string =>
  new Date(Math.round(ms / SECOND_MS) * SECOND_MS).toISOString().slice(11, 19);

/** `06:14:10 to 06:20:00`. */
export const clockSpan = ({ fromMs, toMs }: Interval): string =>
  `${clock(fromMs)} to ${clock(toMs)}`;

/** A duration as it is said: `40 s`, `3 min`, `3 min 20 s`, `2 h 05 min`. Rounded to seconds. */
export function spoken(ms: number): string {
  const seconds = Math.round(ms / SECOND_MS);
  if (seconds < 60) return `${seconds} s`;
  const [minutes, rest] = [Math.floor(seconds / 60), seconds % 60];
  if (minutes < 60) return rest === 0 ? `${minutes} min` : `${minutes} min ${rest} s`;
  return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')} min`;
}

/** A number with a fixed count of decimals, as it stands in a sentence. */
export const decimals = (value: number, digits: number): string => value.toFixed(digits);
