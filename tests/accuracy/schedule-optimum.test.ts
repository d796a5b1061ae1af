import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { BeamAssignInstance } from '../../server/solver/beam-assign.ts';
import { mostValuableIntervals } from '../support/schedule/min-cost-flow.ts';
import { bestByTrying, plainValue, tinyInstance } from '../support/schedule/plain-instance.ts';
import { seededRandom } from '../support/schedule/random.ts';
import { solve } from './adapter.ts';

const fixture = (name: string): BeamAssignInstance & { optimum: number } =>
  JSON.parse(
    readFileSync(new URL(`./fixtures/schedule/${name}.json`, import.meta.url), 'utf8'),
  ) as BeamAssignInstance & { optimum: number };

describe('assignment against proven optima', () => {
  // Optimum of each proven by three native solvers and by enumeration; see fixtures/schedule/SOURCES.md.
  it.each(['p1-setup-time', 'p2-separation', 'p3-minimums'])('%s', async (name) => {
    const { optimum, ...instance } = fixture(name);
    const answer = await solve(instance, { timeLimitSeconds: 20 });
    expect(answer.objective).toBe(optimum);
    expect(answer.bound).toBeCloseTo(optimum, 3);
    expect(answer.gap).toBeCloseTo(0, 6);
    expect(plainValue(instance, answer.windows)).toBe(optimum);
  });

  it('refuses an instance whose lock cannot be held', async () => {
    const { optimum: _, ...instance } = fixture('p1-setup-time');
    const locks = ['wA', 'wB', 'wC'];
    await expect(solve({ ...instance, locks }, { timeLimitSeconds: 5 })).rejects.toThrow(
      /cannot be held/,
    );
  });
});

describe('assignment against trying every plan', () => {
  it('finds the best of 300 tiny instances with every rule', async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1_000_000 }), async (seed) => {
        const instance = tinyInstance(seed);
        const answer = await solve(instance, { timeLimitSeconds: 5 });
        expect(plainValue(instance, answer.windows)).toBeCloseTo(answer.objective, 6);
        expect(answer.objective).toBeCloseTo(bestByTrying(instance), 6);
        expect(answer.bound ?? NaN).toBeGreaterThanOrEqual(answer.objective - 1e-6);
      }),
      { numRuns: 300, seed: 7 },
    );
  });
});

describe('assignment on identical channels against a min-cost flow', () => {
  it('is equal for 60 instances of up to 40 passes', async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1_000_000 }), async (seed) => {
        const random = seededRandom(seed);
        const channels = 1 + Math.floor(4 * random());
        const [setup, teardown] = [Math.floor(30 * random()), Math.floor(20 * random())];
        const passes = Array.from({ length: 10 + Math.floor(30 * random()) }, (_, index) => {
          const start = Math.floor(6000 * random());
          const end = start + 60 + Math.floor(600 * random());
          return { id: `P${index}`, start, end, value: 1 + Math.floor(500 * random()) };
        });
        const instance: BeamAssignInstance = {
          format: 'beam-assign/1',
          horizon: 7000,
          faces: [{ id: 'F', maxTransmit: null }],
          groups: [{ id: 'G', face: 'F', channels, setup, teardown, closed: [] }],
          passes: passes.map(({ id }) => ({ id, mission: 'M', los: 0 })),
          windows: passes.map((pass) => ({ ...pass, pass: pass.id, group: 'G', transmit: false })),
          conflicts: [],
          demands: [],
          locks: [],
        };
        const answer = await solve(instance, { timeLimitSeconds: 10 });
        const busy = passes.map(({ start, end, value }) => ({
          from: start - setup,
          to: end + teardown,
          value,
        }));
        expect(answer.objective).toBeCloseTo(mostValuableIntervals(busy, channels), 6);
      }),
      { numRuns: 60, seed: 11 },
    );
  });
});
