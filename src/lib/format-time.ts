import { DAY_MS, HOUR_MS, MINUTE_MS, SECOND_MS, dayOfYear, toIso } from '../../shared/time.ts';

/** Every time on screen is UTC unless its label says otherwise; an en dash stands between times. */

/** `09:37:50`. Cut, not rounded: a clock never shows a second that has not begun. */
export const clockSeconds = (ms: number): string =>
  toIso(Math.floor(ms / SECOND_MS) * SECOND_MS).slice(11, 19);
/** `09:37`. */
export const clockMinutes = (ms: number): string =>
  toIso(Math.floor(ms / SECOND_MS) * SECOND_MS).slice(11, 16);
/** `09:37–09:42`. */
export const clockSpan = (fromMs: number, toMs: number): string =>
  `${clockMinutes(fromMs)}–${clockMinutes(toMs)}`;
/** `12-02 09:37`, for tables that span days. */
export const monthDayClock = (ms: number): string =>
  `${toIso(ms).slice(5, 10)} ${clockMinutes(ms)}`;
/** `2026-12-02 09:37`. */
export const dateClock = (ms: number): string => `${toIso(ms).slice(0, 10)} ${clockMinutes(ms)}`;
export const dateClockSeconds = (ms: number): string =>
  `${toIso(ms).slice(0, 10)} ${clockSeconds(ms)}`;

const parts = (options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat =>
  new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', ...options });
const long = parts({ weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' });
const medium = parts({ weekday: 'short', day: 'numeric', month: 'short' });
const short = parts({ day: 'numeric', month: 'long' });

const startOf = (day: string): number => Date.parse(`${day}T00:00:00Z`);
/** `Wednesday 2 December 2026`. */
export const longDay = (day: string): string => long.format(startOf(day)).replace(',', '');
/** `Wed 2 Dec`. */
export const mediumDay = (day: string): string => medium.format(startOf(day)).replace(',', '');
/** `2 December`. */
export const shortDay = (day: string): string => short.format(startOf(day));
export const dayNumber = (day: string): number => dayOfYear(startOf(day));
export const nextDay = (day: string, by = 1): string =>
  toIso(startOf(day) + by * DAY_MS).slice(0, 10);

/** `5:00`, minutes and seconds, where the head of the column says "min". */
export const minutesSeconds = (ms: number): string => {
  const seconds = Math.round(ms / SECOND_MS);
  return `${Math.floor(seconds / 60)}:${String(seconds % 60).padStart(2, '0')}`;
};
/** `10 h 54 min`, `54 min`, `40 s`. */
export const spokenDuration = (ms: number): string => {
  const seconds = Math.round(Math.abs(ms) / SECOND_MS);
  if (seconds < 90) return `${seconds} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 60) return `${minutes} min`;
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  if (hours >= 48) return `${Math.floor(hours / 24)} d ${hours % 24} h`;
  return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, '0')} min`;
};
/** `in 4 min`, `12 s ago`: only beside the instant itself. */
export const relativeTime = (ms: number, nowMs: number): string =>
  ms >= nowMs ? `in ${spokenDuration(ms - nowMs)}` : `${spokenDuration(nowMs - ms)} ago`;
/** Age of an element set: `7 h`, `2.4 d`. */
export const ageWords = (hours: number): string =>
  hours < 48 ? `${Math.round(hours)} h` : `${(hours / 24).toFixed(1)} d`;

/** `01:45` or `1:17:45` until an instant. */
export const countdown = (ms: number): string => {
  const seconds = Math.max(0, Math.ceil(ms / SECOND_MS));
  const pad = (n: number): string => String(n).padStart(2, '0');
  const [h, m, s] = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60];
  return h > 0 ? `${h}:${pad(m)}:${pad(s)}` : `${pad(m)}:${pad(s)}`;
};

/** `09:20` read within a UTC day that begins at `dayStartMs`; `24:00` is its end. null: not a time. */
export const readClock = (text: string, dayStartMs: number): number | null => {
  const match = /^(\d{1,2}):(\d{2})(?::(\d{2}))?$/.exec(text.trim());
  if (!match) return null;
  const [h, m, s] = [Number(match[1]), Number(match[2]), Number(match[3] ?? 0)];
  if (h > 24 || m > 59 || s > 59 || (h === 24 && m + s > 0)) return null;
  return dayStartMs + h * HOUR_MS + m * MINUTE_MS + s * SECOND_MS;
};

/** `15:22` in the station's zone; the zone may be unknown to the browser. */
export const localClock = (ms: number, timeZone: string): string | null => {
  try {
    return new Intl.DateTimeFormat('en-GB', {
      timeZone,
      hour: '2-digit',
      minute: '2-digit',
    }).format(ms);
  } catch {
    return null;
  }
};
