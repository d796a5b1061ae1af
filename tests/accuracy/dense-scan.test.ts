/**
 * "None missed, none extra" against brute force: two invented sets of each of 13 kinds of orbit and a known trap, three stations, three
 * uniform masks and one of 36 knots, a day each. The proof over all 1,000 sets is `npm run bench -- pass-search --proof`.
 */
import { describe, expect, it } from 'vitest';
import { searchPasses } from '../../shared/orbit/pass-search.ts';
import { DAY_MS } from '../../shared/time.ts';
import { denseLooks, densePasses } from './dense-scan.ts';
import { allSets, mixedSets, PROOF_MASKS, PROOF_STATIONS } from './mixed-sets.ts';

const FROM_MS = Date.UTC(2026, 11, 1);
const TO_MS = FROM_MS + DAY_MS;
/** The scan's own bisection ends at 0.001 ms; grazing passes of high orbits take the rest. */
const TIME_TOLERANCE_MS = 2;
/** Passes shorter than this may be decided differently by a rounding of the position. */
const SHORTEST_MS = 20;

/** Over the equator it dips far below the horizon between two passes that share one run of the search. */
const DIPPING = 'LAB meo2 29';

const sample = [
  ...mixedSets({ perKind: 2, seed: 20261201 }),
  ...allSets().filter(({ name }) => name === DIPPING),
];

describe('the pass search against a scan of every second', () => {
  it.each(sample.map((set) => [set.name, set] as const))('%s', (_name, elements) => {
    const scan = denseLooks(elements, PROOF_STATIONS, FROM_MS, TO_MS);
    for (const [station, observer] of PROOF_STATIONS.entries())
      for (const mask of PROOF_MASKS) {
        const want = densePasses(scan, station, mask).filter(
          ({ aosMs, losMs }) => losMs - aosMs > SHORTEST_MS,
        );
        const result = searchPasses({ elements, observer, mask, fromMs: FROM_MS, toMs: TO_MS });
        const got = result.passes.filter(({ aosMs, losMs }) => losMs - aosMs > SHORTEST_MS);
        expect(got.length).toBe(want.length);
        for (const [index, pass] of want.entries()) {
          expect(Math.abs((got[index]?.aosMs ?? NaN) - pass.aosMs)).toBeLessThan(TIME_TOLERANCE_MS);
          expect(Math.abs((got[index]?.losMs ?? NaN) - pass.losMs)).toBeLessThan(TIME_TOLERANCE_MS);
          const height = got[index]?.maxElevationDeg ?? NaN;
          expect(Math.abs(height - pass.maxElevationDeg)).toBeLessThan(1e-4);
        }
      }
  });
});
