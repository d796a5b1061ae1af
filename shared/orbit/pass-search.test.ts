import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { twoLines } from '../../tests/support/orbit/two-lines.ts';
import { DAY_MS } from '../time.ts';
import { OrbitInputError } from './input-error.ts';
import { makeTrack } from './make-track.ts';
import type { Observer } from './observer.ts';
import { searchPasses, type HorizonMask, type PassQuery } from './pass-search.ts';
import { predictBatch, predictSatellite } from './predict-batch.ts';
import { trackEndMs } from './track.ts';
import { passesOfTrack } from './track-passes.ts';

const FROM_MS = Date.UTC(2026, 11, 1);
const OBSERVER: Observer = { latitudeDeg: 48, longitudeDeg: 11.3, heightM: 560 };
const QUERY: PassQuery = {
  elements: twoLines(),
  observer: OBSERVER,
  mask: 5,
  fromMs: FROM_MS,
  toMs: FROM_MS + DAY_MS,
};

const fieldOf = (query: Partial<PassQuery>): string => {
  try {
    searchPasses({ ...QUERY, ...query });
  } catch (error) {
    if (error instanceof OrbitInputError) return error.field;
    throw error;
  }
  return 'nothing refused';
};

describe('queries that cannot be used', () => {
  it('names the end of the window when it is wrong', () => {
    expect(fieldOf({ toMs: FROM_MS - 1 })).toBe('toMs');
    expect(fieldOf({ toMs: FROM_MS })).toBe('toMs');
    expect(fieldOf({ toMs: FROM_MS + 33 * DAY_MS })).toBe('toMs');
    expect(fieldOf({ toMs: NaN })).toBe('toMs');
    expect(fieldOf({ fromMs: -Infinity })).toBe('fromMs');
  });

  it.each<[string, Partial<Observer>]>([
    ['latitudeDeg', { latitudeDeg: 91 }],
    ['latitudeDeg', { latitudeDeg: NaN }],
    ['longitudeDeg', { longitudeDeg: 400 }],
    ['heightM', { heightM: 50_000 }],
    ['ut1MinusUtcSeconds', { ut1MinusUtcSeconds: 37 }],
  ])('names observer.%s', (field, change) => {
    expect(fieldOf({ observer: { ...OBSERVER, ...change } })).toBe(`observer.${field}`);
  });

  it.each<[string, HorizonMask]>([
    ['mask', 90],
    ['mask', NaN],
    ['mask', []],
    [
      'mask[1]',
      [
        [20, 5],
        [10, 5],
      ],
    ],
    [
      'mask[2]',
      [
        [10, 5],
        [20, 5],
        [20, 6],
      ],
    ],
    ['mask[0]', [[-1, 5]]],
    [
      'mask[1]',
      [
        [0, 5],
        [360, 5],
      ],
    ],
    ['mask[0]', [[0, 95]]],
    ['mask[0]', [[0, NaN]]],
  ])('names %s of %j', (field, mask) => expect(fieldOf({ mask })).toBe(field));

  it('names elements that describe no orbit above the ground', () => {
    const damaged = (which: 'line1' | 'line2', from: string, to: string): Partial<PassQuery> => {
      const lines = twoLines();
      return { elements: { ...lines, [which]: lines[which].replace(from, to) } };
    };
    expect(fieldOf(damaged('line2', '97.5000', 'xx.xxxx'))).toBe('elements.inclination');
    expect(fieldOf(damaged('line2', '15.10000000', 'xx.xxxxxxxx'))).toBe('elements.meanMotion');
    expect(fieldOf(damaged('line1', '10000-4', 'xxxxx-x'))).toBe('elements.bstar');
    expect(fieldOf(damaged('line1', '335.00000000', 'xxx.xxxxxxxx'))).toBe('elements.epoch');
    expect(fieldOf({ elements: twoLines({ meanMotionRevPerDay: 17.5 }) })).toBe('elements.perigee');
    expect(fieldOf({ elements: twoLines({ eccentricity: 0.2 }) })).toBe('elements.perigee');
    expect(fieldOf({ elements: { line1: '', line2: '' } })).toBe('elements.epoch');
  });

  it('refuses an epoch too far from the window', () => {
    const fromMs = FROM_MS + 401 * DAY_MS;
    expect(fieldOf({ fromMs, toMs: fromMs + DAY_MS })).toBe('elements.epoch');
  });
});

describe('any window and mask', () => {
  const elements = twoLines({ inclinationDeg: 67, raanDeg: 300 });
  const search = (query: Partial<PassQuery>): { aosMs: number; losMs: number }[] =>
    searchPasses({ ...QUERY, elements, ...query }).passes;

  it('gives ordered passes that do not overlap, inside the window, with TCA inside them', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -15, max: 60, noNaN: true }),
        fc.double({ min: -85, max: 85, noNaN: true }),
        fc.double({ min: -5, max: 5, noNaN: true }),
        (mask, latitudeDeg, startDays) => {
          const fromMs = FROM_MS + startDays * DAY_MS;
          const toMs = fromMs + DAY_MS / 2;
          const observer = { ...OBSERVER, latitudeDeg };
          const { passes } = searchPasses({ elements, mask, observer, fromMs, toMs });
          let lastMs = fromMs;
          for (const pass of passes) {
            expect(pass.aosMs).toBeGreaterThanOrEqual(lastMs);
            expect(pass.tcaMs).toBeGreaterThanOrEqual(pass.aosMs);
            expect(pass.losMs).toBeGreaterThanOrEqual(pass.tcaMs);
            expect(pass.losMs).toBeLessThanOrEqual(toMs);
            expect(pass.maxElevationDeg).toBeGreaterThanOrEqual(mask - 1e-6);
            lastMs = pass.losMs;
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('sees under a mask with knots no more than under its lowest and no less than under its highest', () => {
    const seconds = (mask: HorizonMask): number =>
      search({ mask }).reduce((sum, { aosMs, losMs }) => sum + (losMs - aosMs) / 1000, 0);
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 30, noNaN: true }), { minLength: 1, maxLength: 24 }),
        (elevations) => {
          const mask = elevations.map(
            (deg, index) => [(index * 360) / elevations.length, deg] as const,
          );
          for (const { aosMs, tcaMs, losMs } of searchPasses({ ...QUERY, elements, mask }).passes)
            expect(aosMs <= tcaMs && tcaMs <= losMs).toBe(true);
          const seen = seconds(mask);
          expect(seen).toBeLessThanOrEqual(seconds(Math.min(...elevations)) + 0.01);
          expect(seen).toBeGreaterThanOrEqual(seconds(Math.max(...elevations)) - 0.01);
        },
      ),
      { numRuns: 30 },
    );
  });
});

describe('passes of a track', () => {
  it('answers a raised mask like a new search, without propagation', () => {
    const base = searchPasses({ ...QUERY, mask: 0 }).passes;
    const tower: HorizonMask = [
      [0, 8],
      [100, 20],
      [180, 3],
      [270, 12],
    ];
    for (const mask of [0, 10, tower]) {
      const want = searchPasses({ ...QUERY, mask }).passes;
      const got = base.flatMap(({ aosMs, losMs }) =>
        passesOfTrack(makeTrack(QUERY.elements, OBSERVER, aosMs, losMs), OBSERVER, mask),
      );
      expect(got.length).toBe(want.length);
      for (const [index, pass] of want.entries()) {
        expect(Math.abs((got[index]?.aosMs ?? NaN) - pass.aosMs)).toBeLessThan(5);
        expect(Math.abs((got[index]?.losMs ?? NaN) - pass.losMs)).toBeLessThan(5);
        expect(got[index]?.maxElevationDeg).toBeCloseTo(pass.maxElevationDeg, 3);
      }
    }
  });

  it('says when a pass reaches the end of its track', () => {
    const first = searchPasses({ ...QUERY, mask: 10 }).passes[0];
    if (!first) throw new Error('a pass is needed');
    const track = makeTrack(QUERY.elements, OBSERVER, first.aosMs, first.losMs);
    expect(passesOfTrack(track, OBSERVER, 5)).toMatchObject([
      { startsBefore: true, endsAfter: true, aosMs: first.aosMs },
    ]);
  });
});

describe('batches', () => {
  const batch = [
    { id: 'a', elements: twoLines({ catalogNumber: 95111 }) },
    { id: 'b', elements: twoLines({ eccentricity: 0.3 }) },
    { id: 'c', elements: twoLines({ catalogNumber: 95113, raanDeg: 200 }) },
  ];
  const { elements: _elements, ...rest } = QUERY;

  it('predicts with tracks from AOS to LOS', () => {
    const { passes } = predictSatellite(QUERY);
    expect(passes.length).toBeGreaterThan(0);
    for (const { aosMs, losMs, track } of passes) {
      expect(track.startMs).toBe(aosMs);
      expect(trackEndMs(track)).toBeCloseTo(losMs, 3);
    }
  });

  it('gives the same in any order and skips what cannot be used', () => {
    const all = [...predictBatch(batch, rest)];
    const reversed = [...predictBatch([...batch].reverse(), rest)].reverse();
    expect(reversed).toEqual(all);
    expect(all[1]).toMatchObject({ id: 'b', refused: { field: 'elements.perigee' } });
    const alone = predictSatellite({ ...rest, elements: batch[2]?.elements ?? twoLines() });
    expect(all[2]).toEqual({ id: 'c', prediction: alone });
  });

  it('computes nothing ahead of what is asked for', () => {
    const running = predictBatch(batch, rest);
    expect(running.next().value).toMatchObject({ id: 'a' });
    running.return(undefined);
    expect(running.next().done).toBe(true);
  });

  it('throws for a window that no satellite could use', () => {
    expect(() => [...predictBatch(batch, { ...rest, toMs: FROM_MS - 1 })]).toThrow(OrbitInputError);
  });
});
