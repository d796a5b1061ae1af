import { describe, expect, it } from 'vitest';
import type { PlanDesk } from '../hooks/plan-desk.ts';
import { ghostsIn } from './ghosts.ts';

const utc = (clock: string): string => `2026-12-02T${clock}.000Z`;
const ms = (clock: string): number => Date.parse(utc(clock));
const stretch = { fromMs: ms('09:00:00'), toMs: ms('10:00:00') };

type Desk = Parameters<typeof ghostsIn>[0];

const column = (id: string, polarisation: string, closed: unknown[] = []) => [
  id,
  {
    id,
    face: { id: 'north' },
    closed,
    channel: {
      id,
      direction: 'receive',
      polarisation,
      bandwidthKhz: 5000,
      setUpSeconds: 30,
      tearDownSeconds: 10,
      inService: true,
    },
  },
];
const open = (passId: string, aos: string, standing = 'free') => ({
  passId,
  satelliteId: 's',
  standing,
  aosUtc: utc(aos),
});
const pass = (id: string, from: string, to: string) => [
  id,
  {
    id,
    windows: [{ direction: 'receive', faceId: 'north', fromUtc: utc(from), toUtc: utc(to) }],
  },
];
const desk = (more: Record<string, unknown>): Desk =>
  // Only what the placing looks at.
  ({
    columns: new Map([column('L1', 'lhcp'), column('R1', 'rhcp'), column('R2', 'rhcp')] as never),
    satellites: new Map([['s', { downlink: { polarisation: 'rhcp', bandwidthKhz: 2000 } }]]),
    legs: [],
    openPasses: [],
    passes: new Map(),
    ...more,
  }) as unknown as PlanDesk;

describe('open passes in the calendar', () => {
  it('stand in the first channel of their sense that is free, set-up included', () => {
    const legs = [{ channelId: 'R1', fromMs: ms('09:14:00'), toMs: ms('09:19:45') }];
    const found = ghostsIn(
      desk({
        legs,
        openPasses: [open('p', '09:18:00')],
        passes: new Map([pass('p', '09:20:00', '09:25:00')] as never),
      }),
      stretch,
    );
    // R1 is free at 09:20:00, but its set-up of 30 s is not.
    expect(found.map(({ channelId }) => channelId)).toEqual(['R2']);
  });

  it('do not take the same place twice, and none where all is closed or too short', () => {
    const closed = [{ fromMs: stretch.fromMs, toMs: stretch.toMs }];
    const found = ghostsIn(
      desk({
        columns: new Map([column('R1', 'rhcp'), column('R2', 'rhcp', closed)] as never),
        openPasses: [open('a', '09:30:00'), open('b', '09:31:00'), open('c', '09:50:00')],
        passes: new Map([
          pass('a', '09:30:00', '09:35:00'),
          pass('b', '09:31:00', '09:36:00'),
          pass('c', '09:50:00', '09:51:00'),
        ] as never),
      }),
      stretch,
    );
    expect(found.map(({ pass: { passId } }) => passId)).toEqual(['a']);
  });

  it('are left out when nothing could serve them', () => {
    const found = ghostsIn(
      desk({
        openPasses: [open('p', '09:18:00', 'unusable')],
        passes: new Map([pass('p', '09:20:00', '09:25:00')] as never),
      }),
      stretch,
    );
    expect(found).toEqual([]);
  });
});
