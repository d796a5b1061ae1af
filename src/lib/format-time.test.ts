import { describe, expect, it } from 'vitest';
import {
  clockSeconds,
  countdown,
  dayNumber,
  longDay,
  minutesSeconds,
  nextDay,
  readClock,
  spokenDuration,
} from './format-time.ts';

describe('times as they stand on screen', () => {
  it('never shows a second that has not begun', () => {
    expect(clockSeconds(Date.parse('2026-12-02T09:59:59.999Z'))).toBe('09:59:59');
  });

  it('names days in UTC, with day of year', () => {
    expect(longDay('2026-12-02')).toBe('Wednesday 2 December 2026');
    expect(dayNumber('2026-12-02')).toBe(336);
    expect(dayNumber('2028-12-31')).toBe(366);
    expect(nextDay('2026-12-31')).toBe('2027-01-01');
    expect(nextDay('2028-03-01', -1)).toBe('2028-02-29');
  });

  it('says durations', () => {
    expect([40_000, 90_000, 54 * 60_000, 654 * 60_000].map(spokenDuration)).toEqual([
      '40 s',
      '2 min',
      '54 min',
      '10 h 54 min',
    ]);
    expect(minutesSeconds(300_000)).toBe('5:00');
    expect([105_000, 4_665_000, -5].map(countdown)).toEqual(['01:45', '1:17:45', '00:00']);
  });

  it('reads a time of day, to the end of the day and no further', () => {
    expect(readClock('24:00', 1000)).toBe(1000 + 86_400_000);
    expect(readClock('9:05:30', 0)).toBe(32_730_000);
    for (const text of ['24:01', '12', '12:60', 'x']) expect(readClock(text, 0)).toBeNull();
  });
});
