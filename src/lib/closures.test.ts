import { describe, expect, it } from 'vitest';
import type { Channel, Closure } from '../../shared/schemas/channel.ts';
import { closedSpans } from './closures.ts';

const channel = { id: 'ch', faceId: 'fa', direction: 'receive' } as unknown as Channel;
const closure = (more: Partial<Closure>): Closure =>
  ({
    id: 'cl',
    scope: 'channel',
    scopeId: 'ch',
    direction: 'receive',
    fromUtc: '2026-12-02T08:00:00.000Z',
    toUtc: '2026-12-02T12:00:00.000Z',
    reducedByDb: null,
    reason: 'RF chain replaced',
    endedUtc: null,
    ...more,
  }) as Closure;
const span = {
  fromMs: Date.parse('2026-12-02T10:00:00Z'),
  toMs: Date.parse('2026-12-03T00:00:00Z'),
};
const spansOf = (more: Partial<Closure>) => closedSpans(channel, [closure(more)], span);

describe('what closes a channel', () => {
  it('is the part of a closure inside the span', () => {
    const [closed] = spansOf({});
    expect(closed?.fromMs).toBe(span.fromMs);
    expect(closed?.toMs).toBe(Date.parse('2026-12-02T12:00:00Z'));
    expect(spansOf({ toUtc: '2026-12-02T09:59:00.000Z' })).toEqual([]);
  });

  it('may concern the face or the whole station, and the other direction not', () => {
    expect(spansOf({ scope: 'face', scopeId: 'fa' })).toHaveLength(1);
    expect(spansOf({ scope: 'station', scopeId: 'st' })).toHaveLength(1);
    expect(spansOf({ scope: 'face', scopeId: 'other' })).toEqual([]);
    expect(spansOf({ direction: 'transmit' })).toEqual([]);
    expect(spansOf({ direction: 'both' })).toHaveLength(1);
  });

  it('ends when it is ended, holds until further notice, and a mere loss closes nothing', () => {
    expect(spansOf({ endedUtc: '2026-12-02T10:30:00.000Z' })[0]?.toMs).toBe(
      Date.parse('2026-12-02T10:30:00Z'),
    );
    const open = spansOf({ toUtc: null })[0];
    expect(open?.untilFurtherNotice).toBe(true);
    expect(open?.toMs).toBe(span.toMs);
    expect(spansOf({ reducedByDb: 3 })).toEqual([]);
  });
});
