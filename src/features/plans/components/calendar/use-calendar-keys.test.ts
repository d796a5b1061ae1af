import { describe, expect, it } from 'vitest';
import type { PlanLeg } from '../../model/plan-legs.ts';
import { neighbourOf } from './use-calendar-keys.ts';

const leg = (id: string, channelId: string, fromMs: number): PlanLeg =>
  // Only what walking looks at.
  ({ id, channelId, fromMs, toMs: fromMs + 300 }) as unknown as PlanLeg;

const a = leg('a', 'R1', 100);
const b = leg('b', 'R1', 900);
const c = leg('c', 'R3', 850);
const d = leg('d', 'R3', 200);
const legs = [c, b, a, d];
const order = ['R1', 'R2', 'R3'];
const walk = (from: PlanLeg, key: string): string | undefined =>
  neighbourOf(from, legs, { key, order })?.id;

describe('walking from contact to contact', () => {
  it('goes down and up in time within a channel, and stops at the ends', () => {
    expect(walk(a, 'ArrowDown')).toBe('b');
    expect(walk(b, 'ArrowUp')).toBe('a');
    expect(walk(b, 'ArrowDown')).toBeUndefined();
    expect(walk(a, 'ArrowUp')).toBeUndefined();
  });

  it('goes sideways to the nearest in time, over empty channels', () => {
    expect(walk(b, 'ArrowRight')).toBe('c');
    expect(walk(a, 'ArrowRight')).toBe('d');
    expect(walk(d, 'ArrowLeft')).toBe('a');
    expect(walk(c, 'ArrowRight')).toBeUndefined();
  });
});
