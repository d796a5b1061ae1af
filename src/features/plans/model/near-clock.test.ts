import { describe, expect, it } from 'vitest';
import { instantNear } from './near-clock.ts';

const at = (iso: string): number => Date.parse(iso);

describe('a time of day near a known instant', () => {
  it('stays on the same day in the ordinary case', () => {
    const known = at('2026-12-02T09:37:50Z');
    expect(instantNear('09:41:00', known)).toBe(at('2026-12-02T09:41:00Z'));
    expect(instantNear('9:30', known)).toBe(at('2026-12-02T09:30:00Z'));
  });

  it('crosses midnight in both directions', () => {
    const before = at('2026-12-02T23:58:00Z');
    expect(instantNear('00:03:20', before)).toBe(at('2026-12-03T00:03:20Z'));
    const after = at('2026-12-03T00:02:00Z');
    expect(instantNear('23:59:00', after)).toBe(at('2026-12-02T23:59:00Z'));
  });

  it('refuses what is no time', () => {
    for (const text of ['', '9', '25:00', '12:61', 'noon', '12:00:75'])
      expect(instantNear(text, 0)).toBeNull();
  });
});
