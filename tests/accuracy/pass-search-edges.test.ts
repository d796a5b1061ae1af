/** The cases in which pass searches go wrong, each held against the scan of every second. All orbits are invented. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Observer } from '../../shared/orbit/observer.ts';
import {
  searchPasses,
  type HorizonMask,
  type PassSearchResult,
} from '../../shared/orbit/pass-search.ts';
import type { ElementLines } from '../../shared/orbit/propagation.ts';
import { DAY_MS, HOUR_MS, MINUTE_MS } from '../../shared/time.ts';
import { denseLooks, densePasses } from './dense-scan.ts';
import { twoLines } from '../support/orbit/two-lines.ts';

const FROM_MS = Date.UTC(2026, 11, 1);
const TO_MS = FROM_MS + DAY_MS;
const STATION: Observer = { latitudeDeg: 48, longitudeDeg: 11.3, heightM: 560 };
const SYNCHRONOUS = 1.00273791;

interface Case {
  elements: ElementLines;
  observer?: Observer;
  mask?: HorizonMask;
  fromMs?: number;
  toMs?: number;
  /** Tolerance of the highest elevation. */
  elevationDeg?: number;
}

/** Searches, and demands what the scan of every second finds. */
function searchLikeScan(given: Case): PassSearchResult {
  const { elements, observer = STATION, mask = 5, fromMs = FROM_MS, toMs = TO_MS } = given;
  const { elevationDeg = 1e-4 } = given;
  const result = searchPasses({ elements, observer, mask, fromMs, toMs });
  const want = densePasses(denseLooks(elements, [observer], fromMs, toMs), 0, mask);
  expect(result.passes.length).toBe(want.length);
  for (const [index, pass] of want.entries()) {
    const got = result.passes[index];
    expect(Math.abs((got?.aosMs ?? NaN) - pass.aosMs)).toBeLessThan(2);
    // The scan ends at its last whole second.
    if (!got?.endsAfter) expect(Math.abs((got?.losMs ?? NaN) - pass.losMs)).toBeLessThan(2);
    expect(Math.abs((got?.maxElevationDeg ?? NaN) - pass.maxElevationDeg)).toBeLessThan(
      elevationDeg,
    );
  }
  return result;
}

const geostationary = (meanAnomalyDeg: number): ElementLines =>
  twoLines({
    inclinationDeg: 0.05,
    eccentricity: 0.0002,
    meanMotionRevPerDay: SYNCHRONOUS,
    raanDeg: 0,
    argumentOfPerigeeDeg: 0,
    meanAnomalyDeg,
    bstar: ' 00000-0',
  });

describe('visibility without crossings', () => {
  it('reports a satellite that never sets as one pass cut at both ends', () => {
    const { passes, sgp4Calls } = searchLikeScan({ elements: geostationary(80) });
    expect(passes).toHaveLength(1);
    expect(passes[0]).toMatchObject({ startsBefore: true, endsAfter: true });
    expect(passes[0]).toMatchObject({ aosMs: FROM_MS, losMs: TO_MS });
    expect(sgp4Calls).toBeLessThan(12);
  });

  it('reports nothing for a satellite that never rises, for the price of the arcs', () => {
    expect(searchLikeScan({ elements: geostationary(260) }).sgp4Calls).toBeLessThan(8);
    const far = { latitudeDeg: 78, longitudeDeg: 16, heightM: 450 };
    const low = twoLines({ inclinationDeg: 28 });
    expect(searchLikeScan({ elements: low, observer: far }).passes).toHaveLength(0);
  });
});

describe('passes cut by the window', () => {
  const elements = twoLines();
  const whole = searchPasses({
    elements,
    observer: STATION,
    mask: 5,
    fromMs: FROM_MS,
    toMs: TO_MS,
  }).passes;

  it('begins and ends with the window', () => {
    const [first, second] = [whole[0], whole[1]];
    if (!first || !second) throw new Error('two passes are needed');
    const fromMs = Math.round((first.aosMs + first.tcaMs) / 2);
    const toMs = Math.round((second.tcaMs + second.losMs) / 2);
    const { passes } = searchLikeScan({ elements, fromMs, toMs });
    expect(passes[0]).toMatchObject({ aosMs: fromMs, startsBefore: true, endsAfter: false });
    expect(passes.at(-1)).toMatchObject({ losMs: toMs, startsBefore: false, endsAfter: true });
  });

  it('takes the highest point at the edge when the culmination is outside', () => {
    const first = whole[0];
    if (!first) throw new Error('a pass is needed');
    const fromMs = Math.round((first.tcaMs + first.losMs) / 2);
    const { passes } = searchLikeScan({ elements, fromMs, toMs: fromMs + HOUR_MS });
    expect(passes[0]?.tcaMs).toBe(fromMs);
  });

  it('finds the same passes in two windows as in one', () => {
    for (const share of [0.21, 0.5, 0.77]) {
      const cutMs = FROM_MS + share * DAY_MS;
      const parts = [
        [FROM_MS, cutMs],
        [cutMs, TO_MS],
      ].flatMap(
        ([fromMs = NaN, toMs = NaN]) =>
          searchPasses({ elements, observer: STATION, mask: 5, fromMs, toMs }).passes,
      );
      const minutes = (passes: { aosMs: number; losMs: number }[]): number =>
        passes.reduce((sum, { aosMs, losMs }) => sum + (losMs - aosMs) / MINUTE_MS, 0);
      expect(minutes(parts)).toBeCloseTo(minutes(whole), 4);
    }
  });
});

describe('unusual geometry', () => {
  it('keeps one pass with several culminations whole', () => {
    // A synchronous orbit inclined by 40 deg draws a figure of eight: it culminates twice without setting.
    const elements = twoLines({
      inclinationDeg: 40,
      eccentricity: 0.001,
      meanMotionRevPerDay: SYNCHRONOUS,
      raanDeg: 82,
      argumentOfPerigeeDeg: 0,
      meanAnomalyDeg: 0,
      bstar: ' 00000-0',
    });
    const equator = { latitudeDeg: 0, longitudeDeg: 11.3, heightM: 0 };
    const { passes } = searchLikeScan({ elements, observer: equator });
    expect(passes).toHaveLength(1);
    expect(passes[0]?.maxElevationDeg).toBeGreaterThan(80);
  });

  it('passes through the zenith', () => {
    const elements = twoLines({ inclinationDeg: 90 });
    const seen = (longitudeDeg: number): number =>
      Math.max(
        ...searchPasses({
          elements,
          observer: { ...STATION, longitudeDeg },
          mask: 5,
          fromMs: FROM_MS,
          toMs: FROM_MS + 3 * HOUR_MS,
        }).passes.map(({ maxElevationDeg }) => maxElevationDeg),
      );
    let best = 0;
    let step = 10;
    for (let longitude = 0; longitude < 360; longitude += step)
      if (seen(longitude) > seen(best)) best = longitude;
    for (; step > 1e-4; step /= 2)
      for (const longitude of [best - step, best + step])
        if (seen(longitude) > seen(best)) best = longitude;
    expect(seen(best)).toBeGreaterThan(89.99);
    const observer = { ...STATION, longitudeDeg: best };
    const toMs = FROM_MS + 3 * HOUR_MS;
    searchLikeScan({ elements, observer, toMs });
    // Azimuth runs around there; a mask with knots all around must not split the pass.
    const rough = Array.from({ length: 36 }, (_, knot) => [knot * 10, (knot % 3) * 5] as const);
    searchLikeScan({ elements, observer, mask: rough, toMs });
  });

  it('works at the poles', () => {
    for (const latitudeDeg of [90, -90, 89.9999]) {
      const observer = { latitudeDeg, longitudeDeg: 0, heightM: 100 };
      const { passes } = searchLikeScan({ elements: twoLines(), observer });
      expect(passes.length).toBeGreaterThan(10);
    }
  });

  it.each([0.2, 0.5, 0.7, 0.85])('follows an eccentricity of %f', (eccentricity) => {
    const axisKm = (6378 + 600) / (1 - eccentricity);
    const meanMotionRevPerDay = (86_400 / (2 * Math.PI)) * Math.sqrt(398_600.8 / axisKm ** 3);
    const elements = twoLines({
      inclinationDeg: 63.4,
      eccentricity,
      meanMotionRevPerDay,
      argumentOfPerigeeDeg: 270,
    });
    const { passes, guardViolations } = searchLikeScan({ elements });
    expect(passes.length).toBeGreaterThan(0);
    expect(guardViolations).toBe(0);
  });

  it('follows retrograde, equatorial and depressed-horizon cases', () => {
    searchLikeScan({
      elements: twoLines({ inclinationDeg: 180 }),
      observer: { ...STATION, latitudeDeg: 0 },
    });
    searchLikeScan({
      elements: twoLines({ inclinationDeg: 0 }),
      observer: { ...STATION, latitudeDeg: 3 },
    });
    searchLikeScan({ elements: twoLines(), mask: -2 });
    searchLikeScan({ elements: twoLines(), mask: 75 });
  });
});

describe('masks by azimuth', () => {
  const elements = twoLines();

  it('splits a pass at a narrow tower', () => {
    const flat = searchPasses({
      elements,
      observer: STATION,
      mask: 0,
      fromMs: FROM_MS,
      toMs: TO_MS,
    }).passes;
    const low = flat.find(({ maxElevationDeg }) => maxElevationDeg > 10 && maxElevationDeg < 60);
    if (!low) throw new Error('a low pass is needed');
    const at = Math.round(low.tcaAzimuthDeg);
    const tower: [number, number][] = [
      [at - 2, 1],
      [at - 1, 80],
      [at + 1, 80],
      [at + 2, 1],
    ];
    const { passes } = searchLikeScan({ elements, mask: tower });
    const parts = passes.filter(({ aosMs, losMs }) => aosMs < low.losMs && losMs > low.aosMs);
    expect(parts).toHaveLength(2);
    // The highest point of a part may be its edge at the tower.
    const edges = parts.filter(({ tcaMs, aosMs, losMs }) => tcaMs === aosMs || tcaMs === losMs);
    expect(edges.length).toBeGreaterThan(0);
  });

  it('treats knots that agree as a uniform mask', () => {
    const query = { elements, observer: STATION, fromMs: FROM_MS, toMs: TO_MS };
    const knots = searchPasses({
      ...query,
      mask: [
        [0, 5],
        [90, 5],
        [200, 5],
      ],
    });
    expect(knots.passes).toEqual(searchPasses({ ...query, mask: 5 }).passes);
  });

  it('shrinks with a rising mask', () => {
    const seconds = [0, 5, 10, 20, 40].map((mask) =>
      searchPasses({
        elements,
        observer: STATION,
        mask,
        fromMs: FROM_MS,
        toMs: TO_MS,
      }).passes.reduce((sum, { aosMs, losMs }) => sum + (losMs - aosMs) / 1000, 0),
    );
    expect(seconds).toEqual([...seconds].sort((a, b) => b - a));
    expect(new Set(seconds).size).toBe(seconds.length);
  });
});

/** Sets of the SGP4 verification file that fail within a day (AIAA 2006-6753), with their first failing code. */
const verification = readFileSync(
  new URL('./fixtures/orbit/SGP4-VER.TLE', import.meta.url),
  'utf8',
).split(/\r?\n/);
const verificationSet = (number: number): ElementLines => {
  const [line1 = '', line2 = ''] = ['1', '2'].map((which) =>
    (verification.find((line) => line.startsWith(`${which} ${number}`)) ?? '').slice(0, 69),
  );
  return { line1, line2 };
};

/** While drag brings an orbit down, SGP4's velocity, which tells the culmination, is off by metres a second. */
const SINKING_ELEVATION_DEG = 1e-3;

describe('orbits that end', () => {
  const dayOfYear = (year: number, day: number): number =>
    Date.UTC(year, 0, 1) + (day - 1) * DAY_MS;

  it.each([
    [22312, dayOfYear(2006, 94.46235912), 1, 495],
    [29141, dayOfYear(2006, 170.26783845), 6, 440],
    [28350, dayOfYear(2006, 167.21788666), 1, 1560],
  ])('ends %i at its first failure', (number, epochMs, code, latestMinute) => {
    const elements = verificationSet(number);
    const fromMs = Math.ceil(epochMs);
    const { orbitEnd, passes } = searchLikeScan({
      elements,
      fromMs,
      toMs: fromMs + 2 * DAY_MS,
      elevationDeg: SINKING_ELEVATION_DEG,
    });
    expect(orbitEnd?.code).toBe(code);
    const endMinute = ((orbitEnd?.atMs ?? NaN) - epochMs) / MINUTE_MS;
    expect(endMinute).toBeLessThanOrEqual(latestMinute);
    for (const { losMs } of passes) expect(losMs).toBeLessThanOrEqual(orbitEnd?.atMs ?? 0);
  });

  it('shows nothing after the end, though SGP4 answers again', () => {
    const elements = verificationSet(29141);
    const fromMs = dayOfYear(2006, 172);
    const query = { elements, observer: STATION, mask: 0, fromMs, toMs: fromMs + 4 * DAY_MS };
    const { orbitEnd, passes } = searchPasses(query);
    expect(passes).toEqual([]);
    expect(orbitEnd?.atMs).toBeLessThan(fromMs);
  });

  it('refines where a strongly decaying orbit leaves the guard, and says how often', () => {
    const elements = verificationSet(22312);
    const fromMs = Math.ceil(dayOfYear(2006, 94.46235912));
    const result = searchLikeScan({
      elements,
      mask: 0,
      fromMs,
      toMs: fromMs + DAY_MS / 2,
      elevationDeg: SINKING_ELEVATION_DEG,
    });
    expect(result.guardViolations).toBeGreaterThan(0);
  });

  it('follows orbits sinking from 150 km', () => {
    for (const meanMotionRevPerDay of [16.35, 16.4, 16.45])
      searchLikeScan({
        elements: twoLines({ meanMotionRevPerDay, eccentricity: 0.0008, bstar: ' 20000-3' }),
        mask: 0,
      });
  });
});

describe('old and young epochs', () => {
  it.each([60, 30, -10])('searches %i days from the epoch', (days) => {
    const fromMs = FROM_MS + days * DAY_MS;
    searchLikeScan({ elements: twoLines(), fromMs, toMs: fromMs + DAY_MS });
  });

  it('bounds what a resonant deep-space orbit may cost', () => {
    const elements = twoLines({
      inclinationDeg: 63.4,
      eccentricity: 0.7,
      meanMotionRevPerDay: 2.00612,
      argumentOfPerigeeDeg: 270,
    });
    const query = { elements, observer: STATION, mask: 5 };
    const old = searchPasses({
      ...query,
      fromMs: FROM_MS + 300 * DAY_MS,
      toMs: FROM_MS + 301 * DAY_MS,
    });
    expect(old.sgp4Calls).toBeLessThan(40);
    const tooFar = FROM_MS + 500 * DAY_MS;
    expect(() => searchPasses({ ...query, fromMs: tooFar, toMs: tooFar + DAY_MS })).toThrow(
      /elements\.epoch: .* at most 400/,
    );
  });
});
