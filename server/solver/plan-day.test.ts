import { describe, expect, it } from 'vitest';
import { makeFacts } from '../../shared/schedule/facts/make-facts.ts';
import type { ContactModel, DayModel, Facts } from '../../shared/schedule/model.ts';
import { judgePlan } from '../../shared/schedule/rules/judge-plan.ts';
import { overlaps } from '../../shared/time.ts';
import { inventedDay } from '../../tests/support/schedule/invented-day.ts';
import { contactOf, legOn, windowOf } from '../../tests/support/schedule/plan-builder.ts';
import { named } from './changes.ts';
import { planDay } from './plan-day.ts';
import type { SolveInput, SolveResult } from './planned.ts';

const run = (
  input: Partial<SolveInput> & { day: DayModel; facts: Facts },
  stopped = false,
): Promise<SolveResult> =>
  planDay(
    { current: [], mode: 'new', timeLimitSeconds: 10, ...input },
    {
      now: () => performance.now(),
      shouldStop: () => stopped,
      onProgress: () => undefined,
      onPlan: () => undefined,
    },
  );

const day = inventedDay({ seed: 6, satellites: 30, receiveChannels: 2, hours: [0, 16] });
const facts = makeFacts(day);
const window = (passId: string) => windowOf(facts, passId, 'F1', 'receive');

/** Two locks on one channel whose windows overlap. */
function clashingLocks(): [ContactModel, ContactModel] {
  for (const a of day.passes)
    for (const b of day.passes) {
      const [one, other] = [window(a.id), window(b.id)];
      if (a.satelliteId >= b.satelliteId || !one || !other || !overlaps(one, other)) continue;
      if (one.toMs - one.fromMs < 180_000 || other.toMs - other.fromMs < 180_000) continue;
      const lock = (pass: typeof a, span: typeof one, id: string): ContactModel =>
        contactOf(day, pass, { id, receive: legOn('R1', span), locked: true });
      return [lock(a, one, 'lock-a'), lock(b, other, 'lock-b')];
    }
  throw new Error('no clashing windows');
}

describe('planning a day', () => {
  it('sets a lock aside that clashes with another and names both, never "no solution"', async () => {
    const lines = day.requirements.map((line) => ({ ...line, uplink: 'none' as const }));
    const plain = { ...day, requirements: lines };
    const locks = clashingLocks();
    const result = await run({ day: plain, facts, current: locks });
    expect(result.locksSetAside).toHaveLength(1);
    const [aside] = result.locksSetAside;
    expect(aside?.words).toMatch(
      /^The lock of Object \d+ at \d\d:\d\d:\d\d was set aside: it cannot stand beside Object \d+ at/,
    );
    const contacts = named(result.contacts);
    const kept = locks.find(({ id }) => id !== aside?.contactId);
    expect(contacts).toContainEqual(kept);
    expect(judgePlan({ day: plain, facts, contacts })).toEqual([]);
    expect(result.words).toContain(aside?.words);
  });

  it('changes nothing in a second run on its own result', async () => {
    const first = await run({ day, facts });
    const current = named(first.contacts);
    const second = await run({ day, facts, current });
    expect(second.changes).toMatchObject({
      added: 0,
      removed: 0,
      changed: 0,
      kept: current.length,
    });
    expect(second.changes.words).toMatch(/^Nothing changes; \d+ contacts stay\.$/);
  });

  it('has nothing to repair in a plan that holds, and gains nothing by it', async () => {
    const current = named((await run({ day, facts })).contacts).slice(2);
    const result = await run({ day, facts, current, mode: 'repair' });
    expect(named(result.contacts)).toEqual(expect.arrayContaining(current));
    expect(result.contacts).toHaveLength(current.length);
  });

  it('hands over a valid plan when it is stopped at once, and says so', async () => {
    const result = await run({ day, facts }, true);
    expect(result.provenance).toBe('cancelled');
    expect(result.contacts.length).toBeGreaterThan(5);
    expect(judgePlan({ day, facts, contacts: named(result.contacts) })).toEqual([]);
    expect(result.words).toMatch(/^Cancelled: /);
  });

  it('plans an empty day and a day under a thousand closures', async () => {
    const empty = await run({
      day: { ...day, passes: [] },
      facts: { windows: [], conflicts: [], withinHardEnd: [] },
    });
    expect(empty.contacts).toEqual([]);
    expect(empty.provenance).toBe('proven');
    const closures = Array.from({ length: 1000 }, (_, index) => ({
      id: `c${index}`,
      scope: 'channel' as const,
      scopeId: index % 2 ? 'R1' : 'R2',
      direction: 'both' as const,
      fromMs: day.day.fromMs + index * 36_000,
      toMs: day.day.fromMs + index * 36_000 + 9_000,
      reducedByDb: null,
      reason: 'test',
    }));
    const closed = { ...day, closures };
    const result = await run({ day: closed, facts });
    expect(judgePlan({ day: closed, facts, contacts: named(result.contacts) })).toEqual([]);
  });
});
