import { describe, expect, it } from 'vitest';
import { named } from '../../server/solver/changes.ts';
import { planDay } from '../../server/solver/plan-day.ts';
import { verifyPlan } from '../../server/verify/verify-plan.ts';
import { makeFacts } from '../../shared/schedule/facts/make-facts.ts';
import type { ContactModel, DayModel, Facts, PassModel } from '../../shared/schedule/model.ts';
import { judgePlan } from '../../shared/schedule/rules/judge-plan.ts';
import { judgeRequirements } from '../../shared/schedule/score/requirements.ts';
import { HOUR_MS } from '../../shared/time.ts';
import { inventedDay } from '../support/schedule/invented-day.ts';
import { contactOf, legOn, windowOf } from '../support/schedule/plan-builder.ts';

interface World {
  day: DayModel;
  facts: Facts;
}

interface MidnightWorld extends World {
  pass: PassModel;
  other: PassModel;
}

/** A day of one channel in whose last minutes some pass crosses midnight. */
function findMidnightWorld(): MidnightWorld {
  for (let seed = 1; seed < 200; seed++) {
    const day = inventedDay({
      seed,
      satellites: 40,
      hours: [23.6, 24],
      missions: 2,
      receiveChannels: 1,
      transmitChannels: 0,
    });
    day.requirements = [];
    const facts = makeFacts(day);
    const across =
      (ms: number) =>
      (pass: PassModel): boolean => {
        const window = windowOf(facts, pass.id, 'F1', 'receive');
        return window !== null && window.fromMs < ms && window.toMs > ms + 20_000;
      };
    const [pass, other] = day.passes.filter(across(day.day.toMs - 60_000));
    if (pass && other && across(day.day.toMs)(pass)) return { day, facts, pass, other };
  }
  throw new Error('no pass across midnight found');
}

const found = findMidnightWorld();
const midnightWorld = (): MidnightWorld => structuredClone(found);

const whole = ({ day, facts }: World, pass: PassModel, id: string): ContactModel =>
  contactOf(day, pass, { id, receive: legOn('R1', windowOf(facts, pass.id, 'F1', 'receive')) });

const solve = ({ day, facts }: World) =>
  planDay(
    { day, facts, current: [], mode: 'new', timeLimitSeconds: 10 },
    {
      now: () => performance.now(),
      shouldStop: () => false,
      onProgress: () => undefined,
      onPlan: () => undefined,
    },
  );

describe('across midnight', () => {
  it('a contact belongs to the day in which it begins and runs into the next one', async () => {
    const world = midnightWorld();
    const contact = whole(world, world.pass, 'across');
    expect(contact.receive.toMs).toBeGreaterThan(world.day.day.toMs);
    expect(judgePlan({ ...world, contacts: [contact] })).toEqual([]);
    expect(verifyPlan(world.day, [contact])).toEqual([]);
    const planned = named((await solve(world)).contacts);
    for (const { receive } of planned) expect(receive.fromMs).toBeLessThan(world.day.day.toMs);
    expect(planned.some(({ receive }) => receive.toMs > world.day.day.toMs)).toBe(true);
  });

  it('a clash with a contact of the next day is refused, and the solver keeps clear of it', async () => {
    const world = midnightWorld();
    const { toMs } = world.day.day;
    const neighbour = {
      ...whole(world, world.other, 'tomorrow'),
      satelliteId: 'another',
      passId: 'another',
    };
    neighbour.receive = { channelId: 'R1', fromMs: toMs + 5000, toMs: toMs + 300_000 };
    const day = { ...world.day, neighbours: [neighbour] };
    const rules = judgePlan({ ...world, day, contacts: [whole(world, world.pass, 'across')] });
    expect(rules.map(({ rule }) => rule)).toEqual(['channel-busy']);
    expect(verifyPlan(day, [whole(world, world.pass, 'across')]).map(({ rule }) => rule)).toEqual([
      'channel-busy',
    ]);
    const contacts = named((await solve({ day, facts: world.facts })).contacts);
    expect(judgePlan({ day, facts: world.facts, contacts })).toEqual([]);
    for (const { receive } of contacts)
      expect(receive.toMs).toBeLessThanOrEqual(toMs + 5000 - 40_000);
  });

  it('a gap of 20 h over two days is found', () => {
    const world = midnightWorld();
    const [line] = inventedDay({ seed: 1 }).requirements;
    if (!line) throw new Error('no line');
    const gap = {
      ...line,
      id: 'gap',
      missionId: 'm0',
      what: 'gap' as const,
      least: null,
      most: 18 * 60,
      appliesTo: 'together' as const,
      uplink: 'none' as const,
      minimumDurationSeconds: 60,
    };
    const { fromMs } = world.day.day;
    const satelliteId = world.day.satellites.find(({ missionId }) => missionId === 'm0')?.id ?? '';
    const at = (hours: number, id: string): ContactModel => ({
      ...whole(world, world.pass, id),
      passId: id,
      satelliteId,
      missionId: 'm0',
      receive: {
        channelId: 'R1',
        fromMs: fromMs + hours * HOUR_MS - 300_000,
        toMs: fromMs + hours * HOUR_MS,
      },
    });
    const judged = (contacts: ContactModel[], neighbours: ContactModel[]) =>
      judgeRequirements({ ...world.day, requirements: [gap], neighbours }, contacts)[0];
    const late = at(14, 'late');
    const found = judged([late], [at(-6, 'yesterday'), at(30, 'tomorrow')]);
    expect(found?.met).toBe(false);
    expect(found?.given).toBeCloseTo(20 * 60 - 5, 6);
    expect(judged([at(8, 'early'), late], [at(-6, 'yesterday'), at(30, 'tomorrow')])?.met).toBe(
      true,
    );
    const open = judged([at(8, 'early'), late], [at(-6, 'yesterday')]);
    expect(open?.met).toBe(true);
    expect(judged([at(12, 'noon'), at(20, 'evening')], [at(-5, 'yesterday')])?.note).toBe(
      'longest gap 16 h 55 min, 19:00:00 to 11:55:00',
    );
    expect(judged([at(1, 'early'), at(8, 'morning')], [at(-6, 'yesterday')])?.note).toBe(
      'open after 08:00:00: the next contact must begin by 2026-12-03 02:00:00',
    );
  });
});
