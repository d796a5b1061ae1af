import { DAY_MS, HOUR_MS, MINUTE_MS, SECOND_MS } from '../../time.ts';

/** Calendar or day-of-year time of CCSDS 301.0 (ASCII A and B), without offset; UTC. */
const INSTANT = /^(\d{4})-(?:(\d{2})-(\d{2})|(\d{3}))T(\d{2}):(\d{2}):(\d{2})(\.\d+)?Z?$/;

interface Parts {
  year: number;
  month: number;
  /** Day of the month, or of the year when the month is 0. */
  day: number;
  hour: number;
  minute: number;
  second: number;
}

function partsOf(text: string): Parts | null {
  const match = INSTANT.exec(text);
  if (!match) return null;
  const [, year, month, dayOfMonth, dayOfYear, hour, minute, second, fraction] = match;
  return {
    year: Number(year),
    month: month === undefined ? 0 : Number(month),
    day: Number(dayOfMonth ?? dayOfYear),
    hour: Number(hour),
    minute: Number(minute),
    second: Number(`${second ?? ''}${fraction ?? ''}`),
  };
}

const daysIn = (year: number, month: number): number =>
  month === 0
    ? (Date.UTC(year + 1, 0, 1) - Date.UTC(year, 0, 1)) / DAY_MS
    : new Date(Date.UTC(year, month, 0)).getUTCDate();

/** Why a text is no instant: `format`, words for a value out of range, or null when it is one. */
export function instantFault(text: string): string | null {
  const parts = partsOf(text);
  if (!parts) return 'format';
  const { year, month, day, hour, minute, second } = parts;
  const isOrdinal = month === 0 && !/^\d{4}-\d{2}-/.test(text);
  if (!isOrdinal && (month < 1 || month > 12)) return `the month ${month} does not exist`;
  if (day < 1 || day > daysIn(year, month)) return `the day ${day} does not exist there`;
  if (hour > 23 || minute > 59) return 'the time of day does not exist';
  // Leap seconds have no place on the scale of SGP4's epochs.
  return second < 60 ? null : 'the seconds must be below 60';
}

/** The instant of a text without faults, ms UTC, fractional to 0.2 us. */
export function instantOf(text: string): number {
  const parts = partsOf(text);
  if (!parts) return NaN;
  const { year, month, day, hour, minute, second } = parts;
  const dayMs =
    month === 0 ? Date.UTC(year, 0, 1) + (day - 1) * DAY_MS : Date.UTC(year, month - 1, day);
  return dayMs + hour * HOUR_MS + minute * MINUTE_MS + second * SECOND_MS;
}
