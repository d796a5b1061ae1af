/**
 * Tracks against the full chain (SGP4, sidereal rotation, horizon frame) between their knots, over the passes of some
 * sets of every kind of orbit. The pointing need is 0.001 deg.
 */
import { describe, expect, it } from 'vitest';
import { makeTrack } from '../../shared/orbit/make-track.ts';
import { horizonFrame } from '../../shared/orbit/observer.ts';
import { searchPasses } from '../../shared/orbit/pass-search.ts';
import { makeOrbit, propagate, type ElementLines } from '../../shared/orbit/propagation.ts';
import { subsatelliteAt } from '../../shared/orbit/subsatellite.ts';
import { toHorizon } from '../../shared/orbit/topocentric.ts';
import { directionAt, lookAnglesAt, lookAnglesOf, stateAt } from '../../shared/orbit/track.ts';
import { DAY_MS } from '../../shared/time.ts';
import { toDegrees } from '../../shared/units.ts';
import { angleBetween, type Vector3 } from '../../shared/vector.ts';
import { mixedSets } from './mixed-sets.ts';
import { twoLines } from '../support/orbit/two-lines.ts';

const FROM_MS = Date.UTC(2026, 11, 1);
const TO_MS = FROM_MS + DAY_MS;
const OBSERVER = { latitudeDeg: 48, longitudeDeg: 11.3, heightM: 560, ut1MinusUtcSeconds: -0.3 };

interface Worst {
  pointingDeg: number;
  rangeKm: number;
  rangeRateKmS: number;
  heightKm: number;
}

/** Largest errors over the passes of a day, at places that fall on no knot. */
function worstOf(elements: ElementLines): Worst {
  const orbit = makeOrbit(elements);
  const frame = horizonFrame(OBSERVER);
  const worst: Worst = { pointingDeg: 0, rangeKm: 0, rangeRateKmS: 0, heightKm: 0 };
  const query = { elements, observer: OBSERVER, mask: 0, fromMs: FROM_MS, toMs: TO_MS };
  for (const { aosMs, losMs } of searchPasses(query).passes) {
    const track = makeTrack(elements, OBSERVER, aosMs, losMs);
    expect(track.stepMs).toBeLessThanOrEqual(60_000);
    for (let step = 0; step <= 300; step++) {
      const ms = aosMs + ((losMs - aosMs) * step) / 300;
      const teme = propagate(orbit, ms);
      if (!teme) throw new Error('the orbit ends');
      const exact = toHorizon(teme, frame, ms);
      const vector: Vector3 = [exact.eastKm, exact.northKm, exact.upKm];
      const angle = toDegrees(angleBetween(vector, directionAt(track, ms)));
      const [want, got] = [lookAnglesOf(exact), lookAnglesAt(track, ms)];
      const point = subsatelliteAt(track, OBSERVER, ms);
      const heightKm = Math.hypot(teme.x, teme.y, teme.z) - 6378.137;
      worst.pointingDeg = Math.max(worst.pointingDeg, angle);
      worst.rangeKm = Math.max(worst.rangeKm, Math.abs(got.rangeKm - want.rangeKm));
      worst.rangeRateKmS = Math.max(
        worst.rangeRateKmS,
        Math.abs(got.rangeRateKmS - want.rangeRateKmS),
      );
      // The ellipsoid lies at most 21.4 km below its equatorial radius.
      expect(point.heightKm - heightKm).toBeGreaterThan(-0.1);
      expect(point.heightKm - heightKm).toBeLessThan(21.5);
    }
  }
  return worst;
}

describe('tracks against the full chain', () => {
  it.each(mixedSets({ perKind: 2, seed: 5 }).map((set) => [set.name, set] as const))(
    '%s points within 0.001 deg',
    (_name, elements) => {
      const worst = worstOf(elements);
      expect(worst.pointingDeg).toBeLessThan(0.001);
      expect(worst.rangeKm).toBeLessThan(0.01);
      // SGP4's velocity is not the derivative of its position: up to 2.8 m/s for eccentric orbits.
      expect(worst.rangeRateKmS).toBeLessThan(0.003);
    },
  );

  it('points within 0.001 deg close to the perigee of eccentric orbits', () => {
    for (const eccentricity of [0.05, 0.3, 0.7]) {
      const axisKm = (6378 + 300) / (1 - eccentricity);
      const meanMotionRevPerDay = (86_400 / (2 * Math.PI)) * Math.sqrt(398_600.8 / axisKm ** 3);
      const shape = { eccentricity, meanMotionRevPerDay, inclinationDeg: 63.4 };
      // Perigee at 48 deg north: the passes are lowest and fastest over the station.
      const elements = twoLines({ ...shape, argumentOfPerigeeDeg: 56.5, bstar: ' 00000-0' });
      expect(worstOf(elements).pointingDeg).toBeLessThan(0.001);
    }
  });

  it('has the derivative of its own position as velocity', () => {
    const track = makeTrack(twoLines(), OBSERVER, FROM_MS, FROM_MS + 600_000);
    for (const ms of [31_000, 205_500, 444_444].map((offset) => FROM_MS + offset)) {
      const [before, after] = [stateAt(track, ms - 50), stateAt(track, ms + 50)];
      const { eastKmS, northKmS, upKmS } = stateAt(track, ms);
      expect((after.eastKm - before.eastKm) / 0.1).toBeCloseTo(eastKmS, 5);
      expect((after.northKm - before.northKm) / 0.1).toBeCloseTo(northKmS, 5);
      expect((after.upKm - before.upKm) / 0.1).toBeCloseTo(upKmS, 5);
    }
  });
});
