import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { named } from '../../server/solver/changes.ts';
import { planDay } from '../../server/solver/plan-day.ts';
import type { SolveInput, SolveResult } from '../../server/solver/planned.ts';
import { verifyPlan } from '../../server/verify/verify-plan.ts';
import { planContext } from '../../shared/schedule/context.ts';
import type { ContactModel, Violation } from '../../shared/schedule/model.ts';
import { judgeContacts, judgePlan } from '../../shared/schedule/rules/judge-plan.ts';
import { crowdedDay, randomContact } from '../support/schedule/crowded-day.ts';

// Facts, rules, solver and the independent check know nothing of one another; here they are held together.

const run = (input: SolveInput): Promise<SolveResult> =>
  planDay(input, {
    now: () => performance.now(),
    shouldStop: () => false,
    onProgress: () => undefined,
    onPlan: () => undefined,
  });

/** What the check cannot see by its nature: clashes shorter than its second, overhang within its second. */
const belowASecond = ({ rule, fromMs, toMs, value }: Violation): boolean =>
  (rule === 'beams-too-close' && toMs - fromMs < 1000) ||
  (rule === 'hard-end' && toMs - fromMs < 1000) ||
  (rule === 'outside-window' && value !== null && value <= 1);

const signs = (violations: readonly Violation[]): string[] =>
  [
    ...new Set(
      violations.flatMap(
        ({ rule, contactIds }) => `${rule} ${[...new Set(contactIds)].sort().join(' ')}`,
      ),
    ),
  ].sort();

describe('rules and the independent check', () => {
  it('find the same faults in 400 random plans of crowded days', () => {
    let [faults, clean] = [0, 0];
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1_000_000 }), (seed) => {
        const world = crowdedDay(seed);
        const context = planContext(world.day, world.facts);
        for (let plan = 0; plan < 20; plan++) {
          const contacts = Array.from({ length: 1 + (plan % 6) }, (_, index) =>
            randomContact(world, `c${index}`),
          ).filter((one): one is ContactModel => one !== null);
          // Every third plan looks at its first contact from the day after.
          const neighbours = plan % 3 === 0 ? contacts.slice(0, 1) : [];
          const own = contacts.slice(neighbours.length);
          const day = { ...world.day, neighbours };
          const ruled = judgeContacts({ ...context, day }, own).filter((one) => !belowASecond(one));
          const checked = verifyPlan(day, own);
          const crowd = (one: string): boolean => !one.startsWith('transmit-limit');
          expect(signs(ruled).filter(crowd)).toEqual(signs(checked).filter(crowd));
          // A crowd of uplinks is one interval to the rules and one finding a start to the check.
          const crowded = (list: readonly Violation[]): boolean =>
            list.some(({ rule }) => rule === 'transmit-limit');
          expect(crowded(ruled)).toBe(crowded(checked));
          if (ruled.length > 0) faults++;
          else clean++;
        }
      }),
      { numRuns: 20, seed: 3 },
    );
    expect(faults).toBeGreaterThan(100);
    expect(clean).toBeGreaterThan(30);
  });
});

describe('solved plans', () => {
  it('are accepted by rules and check on 30 crowded days, with locks and neighbours', async () => {
    let locked = 0;
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1_000_000 }), async (seed) => {
        const world = crowdedDay(seed);
        const candidates = Array.from({ length: 12 }, (_, index) =>
          randomContact(world, `k${index}`),
        );
        const stand: ContactModel[] = [];
        for (const one of candidates)
          if (one && judgePlan({ ...world, contacts: [...stand, one] }).length === 0)
            stand.push(one);
        const day = { ...world.day, neighbours: stand.slice(0, 1) };
        const current = stand
          .slice(1)
          .map((contact, index) => ({ ...contact, locked: index % 2 === 0 }));
        const input = {
          day,
          facts: world.facts,
          current,
          mode: 'new' as const,
          timeLimitSeconds: 10,
        };
        const result = await run(input);
        const contacts = named(result.contacts);
        expect(judgePlan({ day, facts: world.facts, contacts })).toEqual([]);
        expect(verifyPlan(day, contacts)).toEqual([]);
        expect(result.provenance).toBe('proven');
        expect(result.locksSetAside).toEqual([]);
        for (const lock of current.filter((one) => one.locked)) {
          expect(contacts).toContainEqual(lock);
          locked++;
        }
      }),
      { numRuns: 30, seed: 5 },
    );
    expect(locked).toBeGreaterThan(10);
  });

  it('leave in a repair everything that is not broken, and mend the rest (30 days)', async () => {
    let broken = 0;
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1_000_000 }), async (seed) => {
        const { day, facts, random } = crowdedDay(seed);
        const planned = await run({ day, facts, current: [], mode: 'new', timeLimitSeconds: 10 });
        const current = named(planned.contacts);
        const victim = current[Math.floor(random() * current.length)];
        if (!victim) return;
        const closure = {
          id: 'new',
          scope: 'channel' as const,
          scopeId: victim.receive.channelId,
          direction: 'both' as const,
          fromMs: victim.receive.fromMs + 60_000,
          toMs: victim.receive.toMs + 3_600_000,
          reducedByDb: null,
          reason: 'failure',
        };
        const hit = { ...day, closures: [...day.closures, closure] };
        const faults = judgePlan({ day: hit, facts, contacts: current });
        const hurt = new Set(faults.flatMap(({ contactIds }) => contactIds));
        const result = await run({
          day: hit,
          facts,
          current,
          mode: 'repair',
          timeLimitSeconds: 10,
        });
        const contacts = named(result.contacts);
        expect(judgePlan({ day: hit, facts, contacts })).toEqual([]);
        expect(verifyPlan(hit, contacts)).toEqual([]);
        for (const contact of current)
          if (!hurt.has(contact.id)) expect(contacts).toContainEqual(contact);
        broken += hurt.size;
      }),
      { numRuns: 30, seed: 9 },
    );
    expect(broken).toBeGreaterThan(25);
  });
});
