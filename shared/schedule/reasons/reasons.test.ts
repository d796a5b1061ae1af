import { beforeAll, describe, expect, it } from 'vitest';
import { inventedDay } from '../../../tests/support/schedule/invented-day.ts';
import { fromIso, HOUR_MS } from '../../time.ts';
import { planContext, type PlanContext } from '../context.ts';
import { makeFacts } from '../facts/make-facts.ts';
import type { ContactModel } from '../model.ts';
import { planLegs } from '../plan-legs.ts';
import { judgeContacts } from '../rules/judge-plan.ts';
import { nextContacts } from './next-contacts.ts';
import { openPassesIn, type OpenPassReasons } from './open-passes.ts';
import { placeContact } from './placement.ts';
import type { EditLeg, PlanEdit } from './plan-edits.ts';

/** A day planned first come, first served, on few channels: plenty stays open. */
function crowded(seed: number): { context: PlanContext; contacts: ContactModel[] } {
  const day = inventedDay({
    seed,
    satellites: 40,
    faces: 2,
    receiveChannels: 2,
    transmitChannels: 2,
    hours: [0, 12],
  });
  for (const { downlink } of day.satellites) downlink.frequencyMhz = 2245;
  const context = planContext(day, makeFacts(day));
  const contacts: ContactModel[] = [];
  for (const pass of day.passes) {
    const placed = placeContact(context, { pass, legs: planLegs(context, contacts) });
    if (placed) contacts.push({ ...placed, id: `c-${pass.id}` });
  }
  return { context, contacts };
}

const leg = ({ channelId, fromUtc, toUtc }: EditLeg) => ({
  channelId,
  fromMs: fromIso(fromUtc),
  toMs: fromIso(toUtc),
});

/** The edits carried out as the service would. */
function edited(
  { day, passes }: PlanContext,
  contacts: readonly ContactModel[],
  edits: readonly PlanEdit[],
): ContactModel[] {
  return edits.reduce<ContactModel[]>(
    (plan, edit) => {
      if (edit.op === 'remove') return plan.filter(({ id }) => id !== edit.contactId);
      const receive = leg(edit.receive);
      const transmit = edit.transmit && leg(edit.transmit);
      const faceId = day.channels.find(({ id }) => id === receive.channelId)?.faceId ?? '';
      if (edit.op === 'change')
        return plan.map((one) =>
          one.id === edit.contactId ? { ...one, faceId, receive, transmit } : one,
        );
      const pass = passes.get(edit.passId);
      if (!pass) throw new Error('assigns an unknown pass');
      const { predictionId, satelliteId, missionId } = pass;
      return [
        ...plan,
        {
          id: 'new',
          passId: pass.id,
          predictionId,
          satelliteId,
          missionId,
          faceId,
          receive,
          transmit,
          locked: false,
        },
      ];
    },
    [...contacts],
  );
}

let world: ReturnType<typeof crowded>;
let open: OpenPassReasons[];
beforeAll(() => {
  world = crowded(4);
  open = openPassesIn(world.context, world.contacts);
});

describe('reasons for open passes', () => {
  it('name a rule for every pass that does not fit', () => {
    const stopped = open.filter(({ standing }) => standing !== 'free');
    expect(stopped.length).toBeGreaterThan(10);
    for (const { reasons } of stopped) {
      expect(reasons.length).toBeGreaterThan(0);
      for (const { message } of reasons) expect(message).toMatch(/^[A-Z].*\d.*\.$/);
    }
    expect(new Set(stopped.flatMap(({ reasons }) => reasons.map(({ rule }) => rule)))).toContain(
      'channel-busy',
    );
  });

  it('say of nothing that it fits when a contact was placed first come, first served', () => {
    expect(open.filter(({ standing }) => standing === 'free')).toEqual([]);
  });

  it('offer only changes that break no rule and put the pass on the plan', () => {
    const kinds = new Set<string>();
    for (const { passId, wouldFree } of open)
      for (const { kind, edits } of wouldFree) {
        kinds.add(kind);
        if (edits.length === 0) continue;
        const plan = edited(world.context, world.contacts, edits);
        expect(judgeContacts(world.context, plan)).toEqual([]);
        expect(plan.map((one) => one.passId)).toContain(passId);
      }
    expect([...kinds]).toEqual(expect.arrayContaining(['drop', 'channel', 'limit-of-day']));
  });

  it('never ask a locked contact to give way', () => {
    const locked = world.contacts.map((contact) => ({ ...contact, locked: true }));
    const found = openPassesIn(world.context, locked);
    expect(
      found.flatMap(({ wouldFree }) => wouldFree).filter(({ edits }) => edits.length > 0),
    ).toEqual([]);
  });
});

describe('next contacts', () => {
  it('come soonest first, say what they displace, and hold when that has gone', () => {
    let [displacing, free] = [0, 0];
    for (const { id } of world.context.day.satellites) {
      const fromMs = world.context.day.day.fromMs + 3 * HOUR_MS;
      const chances = nextContacts({
        days: [world],
        satelliteId: id,
        fromMs,
        needsUplink: false,
        limit: 6,
      });
      // A contact that is planned already may have begun.
      const fresh = chances.filter(({ words }) => !words.includes('planned already'));
      expect(fresh.every((chance) => chance.fromMs >= fromMs)).toBe(true);
      const begins = chances.map((chance) => chance.fromMs);
      expect(begins).toEqual(begins.toSorted((a, b) => a - b));
      for (const { passId, faceId, receive, transmit, displaces } of chances) {
        if (!receive) continue;
        const pass = world.context.passes.get(passId);
        if (!pass) throw new Error('unknown pass');
        const rest = world.contacts.filter(
          (one) => !displaces.includes(one) && one.passId !== passId,
        );
        const { predictionId, satelliteId, missionId } = pass;
        const contact = {
          id: 'urgent',
          passId,
          predictionId,
          satelliteId,
          missionId,
          faceId,
          receive,
          transmit,
          locked: false,
        };
        expect(judgeContacts(world.context, [...rest, contact])).toEqual([]);
        if (displaces.length > 0) displacing++;
        else free++;
      }
    }
    expect(displacing).toBeGreaterThan(5);
    expect(free).toBeGreaterThan(5);
  });
});
