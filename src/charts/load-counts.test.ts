import { describe, expect, it } from 'vitest';
import { MINUTE_MS } from '../../shared/time.ts';
import { capacityOf, countLoad, fullStretches, runsOf, type LoadLeg } from './load-counts.ts';

const span = { fromMs: 0, toMs: 10 * MINUTE_MS };
const leg = (from: number, to: number, more: Partial<LoadLeg> = {}): LoadLeg => ({
  fromMs: from * MINUTE_MS,
  toMs: to * MINUTE_MS,
  direction: 'receive',
  series: 1,
  ...more,
});

describe('load of a day', () => {
  it('counts a leg in the minutes whose middle it touches', () => {
    const { total } = countLoad([leg(1.4, 3.6)], 'receive', span);
    expect([...total]).toEqual([0, 1, 1, 1, 0, 0, 0, 0, 0, 0]);
  });

  it('stacks missions in a fixed order and finds the busiest minute', () => {
    const legs = [leg(2, 5, { series: 4 }), leg(3, 6), leg(3, 4, { series: null })];
    const load = countLoad(legs, 'receive', span);
    expect(load.stacks.map(({ series }) => series)).toEqual([1, 4, null]);
    expect(load.most).toBe(3);
    expect(load.mostAtMs).toBe(3 * MINUTE_MS);
  });

  it('leaves the other direction out and cuts legs at the ends of the span', () => {
    const legs = [leg(-4, 2), leg(8, 99), leg(0, 10, { direction: 'transmit' })];
    expect([...countLoad(legs, 'receive', span).total]).toEqual([1, 1, 0, 0, 0, 0, 0, 0, 1, 1]);
  });

  it('says when every open channel is in use', () => {
    const channels = [{ closed: [] }, { closed: [{ fromMs: 4 * MINUTE_MS, toMs: 7 * MINUTE_MS }] }];
    const capacity = capacityOf(channels, span);
    expect(runsOf(capacity).map(({ value }) => value)).toEqual([2, 1, 2]);
    const { total } = countLoad([leg(2, 6)], 'receive', span);
    expect(fullStretches(total, capacity)).toEqual([{ from: 4, to: 6 }]);
  });
});
