import { describe, expect, it } from 'vitest';
import { DAY_START_MS, inventedDay } from '../../../tests/support/schedule/invented-day.ts';
import { inventedChannel } from '../../../tests/support/schedule/invented-station.ts';
import { contactOf, legOn, windowOf } from '../../../tests/support/schedule/plan-builder.ts';
import { DAY_MS, overlaps } from '../../time.ts';
import { allowedIntervals } from '../allowed-intervals.ts';
import { makeFacts } from '../facts/make-facts.ts';
import type { ContactModel, DayModel, Facts, PassModel, Rule } from '../model.ts';
import { judgePlan } from './judge-plan.ts';

/** A plain day: one face, two receive channels, two transmit channels, no wishes but three minutes. */
function plainDay(change: (day: DayModel) => void = () => undefined): {
  day: DayModel;
  facts: Facts;
} {
  const day = inventedDay({ seed: 3, satellites: 12, missions: 2, receiveChannels: 2 });
  day.requirements = [];
  for (const satellite of day.satellites) {
    satellite.timeUncertaintySeconds = 0;
    satellite.downlink.polarisation = 'rhcp';
    if (satellite.uplink) satellite.uplink.polarisation = 'rhcp';
  }
  change(day);
  return { day, facts: makeFacts(day) };
}

/** A pass of a satellite with an uplink and at least five minutes of transmit window. */
function goodPass({ day, facts }: { day: DayModel; facts: Facts }, after = 0): PassModel {
  const pass = day.passes.find((one) => {
    const window = windowOf(facts, one.id, 'F1', 'transmit');
    return one.fromMs > day.day.fromMs + after && window && window.toMs - window.fromMs > 200_000;
  });
  if (!pass) throw new Error('no good pass');
  return pass;
}

const both = (world: { day: DayModel; facts: Facts }, pass: PassModel): ContactModel =>
  contactOf(world.day, pass, {
    receive: legOn('R1', windowOf(world.facts, pass.id, 'F1', 'receive')),
    transmit: legOn('T1', windowOf(world.facts, pass.id, 'F1', 'transmit')),
  });

const broken = (world: { day: DayModel; facts: Facts }, ...contacts: ContactModel[]): Rule[] => [
  ...new Set(judgePlan({ ...world, contacts }).map(({ rule }) => rule)),
];

/** Two passes of different satellites whose receive windows overlap. */
function overlappingPair({ day, facts }: { day: DayModel; facts: Facts }): [PassModel, PassModel] {
  for (const a of day.passes)
    for (const b of day.passes) {
      const [one, other] = [a, b].map(({ id }) => windowOf(facts, id, 'F1', 'receive'));
      if (a.satelliteId < b.satelliteId && one && other && overlaps(one, other)) return [a, b];
    }
  throw new Error('no overlapping pair');
}

describe('the rules of a plan', () => {
  it('accept a contact over its whole windows', () => {
    const world = plainDay();
    expect(judgePlan({ ...world, contacts: [both(world, goodPass(world))] })).toEqual([]);
  });

  it('channel-busy: two contacts need set-up and tear-down between them, counted to the second', () => {
    const world = plainDay();
    const [a, b] = overlappingPair(world);
    const window = legOn('R1', windowOf(world.facts, a.id, 'F1', 'receive'));
    const other = legOn('R1', windowOf(world.facts, b.id, 'F1', 'receive'));
    const first = contactOf(world.day, a, { receive: window });
    const clash = judgePlan({
      ...world,
      contacts: [first, contactOf(world.day, b, { receive: other })],
    });
    expect(clash.map(({ rule }) => rule)).toContain('channel-busy');
    expect(clash.find(({ rule }) => rule === 'channel-busy')?.message).toMatch(
      /^Channel R1 is held by Object \d+ until \d\d:\d\d:\d\d, but Object \d+ needs it from/,
    );
    const elsewhere = contactOf(world.day, b, { receive: { ...other, channelId: 'R2' } });
    expect(broken(world, first, elsewhere)).not.toContain('channel-busy');
  });

  it('channel-busy: 40 s of set-up and tear-down are needed, 39 s are refused', () => {
    const world = plainDay();
    const pass = goodPass(world);
    const whole = legOn('R1', windowOf(world.facts, pass.id, 'F1', 'receive'));
    const middle = whole.fromMs + 90_000;
    const part = (fromMs: number, toMs: number, id: string): ContactModel =>
      contactOf(world.day, pass, { id, receive: { channelId: 'R1', fromMs, toMs } });
    const first = part(whole.fromMs, middle, 'one');
    expect(broken(world, first, part(middle + 40_000, whole.toMs, 'two'))).toEqual([]);
    expect(broken(world, first, part(middle + 39_000, whole.toMs, 'two'))).toEqual([
      'channel-busy',
    ]);
  });

  it('channel-busy: a time uncertainty widens what a receive leg holds', () => {
    const world = plainDay((day) => {
      for (const satellite of day.satellites) satellite.timeUncertaintySeconds = 5;
    });
    const pass = goodPass(world);
    const whole = legOn('R1', windowOf(world.facts, pass.id, 'F1', 'receive'));
    const middle = whole.fromMs + 90_000;
    const first = contactOf(world.day, pass, { id: 'one', receive: { ...whole, toMs: middle } });
    const second = (gapMs: number): ContactModel =>
      contactOf(world.day, pass, { id: 'two', receive: { ...whole, fromMs: middle + gapMs } });
    expect(broken(world, first, second(49_000))).toEqual(['channel-busy']);
    expect(broken(world, first, second(50_000))).toEqual([]);
  });

  it('outside-window: a receive leg may overhang by the guard time, a transmit leg never', () => {
    const world = plainDay();
    const contact = both(world, goodPass(world));
    const { receive, transmit } = contact;
    if (!transmit) throw new Error('no uplink');
    const longer = (ms: number): ContactModel => ({
      ...contact,
      receive: { ...receive, fromMs: receive.fromMs - ms },
    });
    expect(broken(world, longer(9_000))).toEqual([]);
    expect(broken(world, longer(12_000))).toContain('outside-window');
    const later = { ...contact, transmit: { ...transmit, fromMs: transmit.fromMs - 1000 } };
    expect(broken(world, later)).toContain('outside-window');
  });

  it('outside-window: the uplink lies inside the downlink', () => {
    const world = plainDay();
    const contact = both(world, goodPass(world));
    const short = { ...contact.receive, toMs: contact.receive.toMs - 120_000 };
    expect(broken(world, { ...contact, receive: short })).toEqual(['outside-window']);
  });

  it('channel-unfit: direction, bandwidth, sense, service and face of the channel', () => {
    const world = plainDay((day) => {
      day.channels.push(
        inventedChannel('narrow', 'F1', { bandwidthKhz: 100 }),
        inventedChannel('left', 'F1', { polarisation: 'lhcp' }),
        inventedChannel('linear', 'F1', { polarisation: 'linear' }),
        inventedChannel('resting', 'F1', { inService: false }),
      );
    });
    const pass = goodPass(world);
    const window = windowOf(world.facts, pass.id, 'F1', 'receive');
    const on = (channelId: string): Rule[] =>
      broken(world, contactOf(world.day, pass, { receive: legOn(channelId, window) }));
    for (const channelId of ['narrow', 'left', 'resting', 'T1'])
      expect(on(channelId)).toEqual(['channel-unfit']);
    expect(on('linear')).toEqual([]);
    const elsewhere = contactOf(world.day, pass, { faceId: 'F9', receive: legOn('R1', window) });
    expect(broken(world, elsewhere)).toContain('channel-unfit');
  });

  it('transmit-limit: as many uplinks at once as the face has transmit beams', () => {
    const world = plainDay((day) => {
      for (const face of day.faces) face.transmitBeamLimit = 0;
    });
    expect(broken(world, both(world, goodPass(world)))).toEqual(['transmit-limit']);
  });

  it('closure: by place and direction, until further notice too; a reduction is no closure', () => {
    const world = plainDay();
    const whole = both(world, goodPass(world));
    if (!whole.transmit) throw new Error('no uplink');
    const later = { ...whole.transmit, fromMs: whole.receive.fromMs + 10_000 };
    const contact = { ...whole, transmit: later };
    const closed = (change: Partial<DayModel['closures'][number]>): Rule[] => {
      const closure = {
        id: 'c',
        scope: 'station' as const,
        scopeId: 'station',
        direction: 'both' as const,
        fromMs: contact.receive.toMs - 1000,
        toMs: null,
        reducedByDb: null,
        reason: 'snow',
        ...change,
      };
      return broken({ ...world, day: { ...world.day, closures: [closure] } }, contact);
    };
    expect(closed({})).toEqual(['closure']);
    expect(closed({ scope: 'face', scopeId: 'F1', direction: 'receive' })).toEqual(['closure']);
    expect(closed({ scope: 'channel', scopeId: 'R2' })).toEqual([]);
    expect(
      closed({
        direction: 'transmit',
        fromMs: contact.receive.fromMs,
        toMs: contact.receive.fromMs + 1,
      }),
    ).toEqual([]);
    expect(closed({ reducedByDb: 2 })).toEqual([]);
    expect(closed({ fromMs: contact.receive.toMs })).toEqual([]);
  });

  it('too-short: downlink and required uplink of the service', () => {
    const line = {
      id: 'line',
      missionId: 'm0',
      appliesTo: 'each' as const,
      stationId: null,
      what: 'contacts' as const,
      least: 1,
      most: null,
      minimumDurationSeconds: 120,
      uplink: 'required' as const,
      leastUplinkMinutes: 2,
      minimumElevationDeg: null,
      marginFloorDb: null,
      hoursUtc: null,
      weekdays: null,
      scanLossLimitDb: null,
    };
    const world = plainDay((day) => {
      day.requirements = [line, { ...line, missionId: 'm1' }];
    });
    const contact = both(world, goodPass(world));
    const { receive, transmit } = contact;
    if (!transmit) throw new Error('no uplink');
    expect(broken(world, contact)).toEqual([]);
    expect(broken(world, { ...contact, transmit: null })).toEqual(['too-short']);
    const brief = { ...transmit, toMs: transmit.fromMs + 119_000 };
    expect(broken(world, { ...contact, transmit: brief })).toEqual(['too-short']);
    const short = { ...receive, toMs: receive.fromMs + 119_000 };
    expect(broken(world, { ...contact, receive: short })).toContain('too-short');
  });

  it('duplicate: one satellite, two contacts at once', () => {
    const world = plainDay();
    const pass = goodPass(world);
    const window = windowOf(world.facts, pass.id, 'F1', 'receive');
    const [one, two] = ['R1', 'R2'].map((channelId) =>
      contactOf(world.day, pass, { id: channelId, receive: legOn(channelId, window) }),
    );
    if (!one || !two) throw new Error('no contacts');
    expect(broken(world, one, two)).toEqual(['duplicate']);
  });

  it('hard-end: nothing beyond it, named besides the window', () => {
    const world = plainDay((day) => {
      for (const face of day.faces) face.hardEndDb = 2;
    });
    const open = plainDay();
    const contact = both(open, goodPass(open));
    expect(broken(open, contact)).toEqual([]);
    const rules = judgePlan({ ...world, contacts: [contact] }).map(({ rule }) => rule);
    expect(rules).toContain('hard-end');
    expect(rules).toContain('outside-window');
  });

  it('beams-too-close: only while both beams are on, only on that face', () => {
    const world = plainDay((day) => {
      for (const { downlink } of day.satellites) downlink.frequencyMhz = 2245;
    });
    const [a, b] = overlappingPair(world);
    const clash = {
      fromMs: Math.max(a.fromMs, b.fromMs),
      toMs: Math.min(a.toMs, b.toMs),
      faceId: 'F1',
      direction: 'receive' as const,
      passIds: [a.id, b.id] as [string, string],
      worstAtMs: a.tcaMs,
      separationHpbw: 0.7,
      requiredHpbw: 1.25,
      isolationDb: null,
      requiredDb: null,
    };
    const one = contactOf(world.day, a, {
      receive: legOn('R1', windowOf(world.facts, a.id, 'F1', 'receive')),
    });
    const other = contactOf(world.day, b, {
      receive: legOn('R2', windowOf(world.facts, b.id, 'F1', 'receive')),
    });
    const facts = { ...world.facts, conflicts: [clash] };
    const [found] = judgePlan({ day: world.day, facts, contacts: [one, other] });
    expect(found?.rule).toBe('beams-too-close');
    expect(found?.message).toMatch(
      /come too close from .*: 0.70 half-power beamwidths where 1.25 are needed/,
    );
    expect(found?.fromMs).toBe(Math.max(one.receive.fromMs, other.receive.fromMs));
    const touching = { ...clash, toMs: found?.fromMs ?? 0 };
    expect(
      judgePlan({
        day: world.day,
        facts: { ...facts, conflicts: [touching] },
        contacts: [one, other],
      }),
    ).toEqual([]);
  });
});

describe('across midnight', () => {
  it('a neighbour that still holds the channel is a clash, and is not judged itself', () => {
    const world = plainDay();
    const pass = goodPass(world);
    const contact = both(world, pass);
    const neighbour = {
      ...contact,
      id: 'yesterday',
      satelliteId: 'other',
      passId: 'other',
      transmit: null,
    };
    const day = { ...world.day, neighbours: [neighbour] };
    expect(broken({ ...world, day }, contact)).toEqual(['channel-busy']);
    expect(judgePlan({ ...world, day, contacts: [] })).toEqual([]);
    expect(neighbour.receive.fromMs).toBeLessThan(DAY_START_MS + DAY_MS);
  });
});

describe('allowed intervals', () => {
  it('are exactly where a leg can be put', () => {
    const world = plainDay();
    const [a, b] = overlappingPair(world);
    const first = contactOf(world.day, a, {
      receive: legOn('R1', windowOf(world.facts, a.id, 'F1', 'receive')),
    });
    const allowed = allowedIntervals({
      ...world,
      contacts: [first],
      channelId: 'R1',
      passId: b.id,
    });
    const at = (fromMs: number): boolean =>
      judgePlan({
        ...world,
        contacts: [
          first,
          contactOf(world.day, b, { receive: { channelId: 'R1', fromMs, toMs: fromMs + 1000 } }),
        ],
      }).length === 0;
    for (let ms = Math.floor(b.fromMs / 1000) * 1000; ms < b.toMs; ms += 1000) {
      const inside = allowed.some(({ fromMs, toMs }) => fromMs <= ms && ms + 1000 <= toMs);
      expect(`${ms} ${inside}`).toBe(`${ms} ${at(ms)}`);
    }
    const own = allowedIntervals({
      ...world,
      contacts: [first],
      channelId: 'R1',
      passId: a.id,
      ignoreContactId: first.id,
    });
    expect(
      own.some(({ fromMs, toMs }) => fromMs <= first.receive.fromMs && first.receive.toMs <= toMs),
    ).toBe(true);
  });
});
