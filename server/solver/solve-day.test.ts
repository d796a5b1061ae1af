import { describe, expect, it } from 'vitest';
import { inventedDay } from '../../tests/support/schedule/invented-day.ts';
import { makeFacts } from '../../shared/schedule/facts/make-facts.ts';
import { judgePlan } from '../../shared/schedule/rules/judge-plan.ts';
import { verifyPlan } from '../verify/verify-plan.ts';
import { named } from './changes.ts';
import { solveDay } from './solve-day.ts';

const quietly = () => ({ signal: new AbortController().signal, onProgress: () => undefined });

describe('a run in its own thread', () => {
  it('proves a plan that rules and check confirm', { timeout: 60_000 }, async () => {
    const day = inventedDay({ seed: 5, satellites: 16, receiveChannels: 3 });
    const facts = makeFacts(day);
    const steps: string[] = [];
    const result = await solveDay(
      { day, facts, current: [], mode: 'new', timeLimitSeconds: 20 },
      { signal: new AbortController().signal, onProgress: (_fraction, step) => steps.push(step) },
    );
    const contacts = named(result.contacts);
    expect(contacts.length).toBeGreaterThan(20);
    expect(judgePlan({ day, facts, contacts })).toEqual([]);
    expect(verifyPlan(day, contacts)).toEqual([]);
    expect(result.provenance).toBe('proven');
    expect(result.words).toMatch(/^Proven best\./);
    expect(steps).toContain('Building the model');
  });

  it('rejects when its thread fails, with a message', async () => {
    const day = inventedDay({ satellites: 2, hours: [0, 4] });
    const facts = { ...makeFacts(day), windows: null as unknown as [] };
    const run = solveDay({ day, facts, current: [], mode: 'new', timeLimitSeconds: 5 }, quietly());
    await expect(run).rejects.toThrow(/^The planner failed: /);
  });
});
