import { describe, expect, it } from 'vitest';
import { toDegrees } from '../units.ts';
import { horizonFrame } from './observer.ts';
import { refractionDeg } from './refraction.ts';
import { meanSiderealTime } from './sidereal-time.ts';
import { subsatelliteAt } from './subsatellite.ts';
import { toHorizon } from './topocentric.ts';
import { lookAnglesOf, stateAt, trackEndMs, type Track } from './track.ts';

const hours = (h: number, m: number, s: number): number => h + m / 60 + s / 3600;

describe('Greenwich mean sidereal time', () => {
  // Values from memory of the books; both agree with this formula to their last digit.
  it.each([
    ['Vallado, Fundamentals of Astrodynamics, example 3-5', [1992, 7, 20, 12, 14], 152.57878781],
    [
      'Meeus, Astronomical Algorithms, example 12.a',
      [1987, 3, 10, 0, 0],
      15 * hours(13, 10, 46.3668),
    ],
    ['Meeus, example 12.b', [1987, 3, 10, 19, 21], 15 * hours(8, 34, 57.0896)],
  ] as const)('%s', (_source, [year, month, day, hour, minute], deg) => {
    const angle = toDegrees(meanSiderealTime(Date.UTC(year, month, day, hour, minute)));
    expect(angle).toBeCloseTo(deg, 6);
  });

  it('turns once in a mean sidereal day of 86,164.0905 s', () => {
    const ms = Date.UTC(2026, 11, 1);
    expect(meanSiderealTime(ms + 86_164_090.5)).toBeCloseTo(meanSiderealTime(ms), 8);
  });
});

describe('the horizon frame', () => {
  it('places a site on the WGS 84 ellipsoid (Vallado, example 7-1, from memory)', () => {
    const site = horizonFrame({ latitudeDeg: 39.007, longitudeDeg: -104.883, heightM: 2187 });
    expect(site.axisDistanceKm * site.cosLongitude).toBeCloseTo(-1275.1219, 3);
    expect(site.axisDistanceKm * site.sinLongitude).toBeCloseTo(-4797.989, 3);
    expect(site.zKm).toBeCloseTo(3994.2975, 3);
  });

  it('sees a point above the site in the zenith and one north of it in the north', () => {
    const ms = Date.UTC(2026, 5, 1, 3, 4, 5);
    const observer = { latitudeDeg: 52, longitudeDeg: -17, heightM: 80 };
    const frame = horizonFrame(observer);
    const local = meanSiderealTime(ms) + (-17 * Math.PI) / 180;
    const inertial = (out: number, z: number): Parameters<typeof toHorizon>[0] => ({
      x: out * Math.cos(local),
      y: out * Math.sin(local),
      z,
      vx: 0,
      vy: 0,
      vz: 0,
    });
    const [upOut, upZ] = [frame.cosLatitude, frame.sinLatitude];
    const above = toHorizon(
      inertial(frame.axisDistanceKm + 700 * upOut, frame.zKm + 700 * upZ),
      frame,
      ms,
    );
    expect(lookAnglesOf(above)).toMatchObject({ elevationDeg: expect.closeTo(90, 6) as number });
    expect(above.upKm).toBeCloseTo(700, 9);
    const north = toHorizon(
      inertial(frame.axisDistanceKm - 500 * upZ, frame.zKm + 500 * upOut),
      frame,
      ms,
    );
    const { azimuthDeg, elevationDeg, rangeKm } = lookAnglesOf(north);
    expect(Math.sin((azimuthDeg * Math.PI) / 180)).toBeCloseTo(0, 9);
    expect(elevationDeg).toBeCloseTo(0, 9);
    expect(rangeKm).toBeCloseTo(500, 9);
  });

  it('turns by the angle of UT1 - UTC', () => {
    const ms = Date.UTC(2026, 5, 1);
    const place = { latitudeDeg: 10, longitudeDeg: 20, heightM: 0 };
    const state = { x: 7000, y: 100, z: 200, vx: 0, vy: 7.5, vz: 1 };
    const late = toHorizon(state, horizonFrame({ ...place, ut1MinusUtcSeconds: 0.5 }), ms);
    // Half a second later the Earth has turned as far under a satellite that stood still.
    const moved = toHorizon(state, horizonFrame(place), ms + 500);
    expect(late.eastKm).toBeCloseTo(moved.eastKm, 9);
    expect(late.upKm).toBeCloseTo(moved.upKm, 9);
  });
});

describe('tracks', () => {
  /** Straight lines, so that every value between the knots is known. */
  const track: Track = {
    startMs: 1000,
    stepMs: 60_000,
    knots: [0, 1, 2, 3, 10, 300, 400, 1, 5, -2].flatMap((up, knot) => [
      100 + knot * 60,
      200 - knot * 30,
      up,
      1,
      -0.5,
      0,
    ]),
  };

  it('meets its knots and runs straight between them where they lie straight', () => {
    const { eastKm, northKm, upKm } = stateAt(track, 1000 + 4 * 60_000);
    expect([eastKm, northKm, upKm]).toEqual([340, 80, 10]);
    const between = stateAt(track, 1000 + 2.25 * 60_000);
    expect(between.eastKm).toBeCloseTo(235, 9);
    expect(between.northKmS).toBeCloseTo(-0.5, 9);
    expect(trackEndMs(track)).toBe(1000 + 9 * 60_000);
  });

  it('continues its ends', () => {
    expect(stateAt(track, 500).eastKm).toBeCloseTo(99.5, 9);
    expect(stateAt(track, trackEndMs(track) + 500).eastKm).toBeCloseTo(640.5, 9);
  });

  it('gives look angles of a state worked by hand', () => {
    // 3-4-12-13: azimuth of (3, 4) is atan(3/4), elevation atan(12/5), receding by (3*1 + 4*2 + 12*3)/13.
    const state = { eastKm: 3, northKm: 4, upKm: 12, eastKmS: 1, northKmS: 2, upKmS: 3 };
    const angles = lookAnglesOf(state);
    expect(angles.azimuthDeg).toBeCloseTo(36.8698976, 6);
    expect(angles.elevationDeg).toBeCloseTo(67.3801351, 6);
    expect(angles.rangeKm).toBeCloseTo(13, 12);
    expect(angles.rangeRateKmS).toBeCloseTo(47 / 13, 12);
    expect(lookAnglesOf({ ...state, eastKm: -3 }).azimuthDeg).toBeCloseTo(323.1301024, 6);
  });
});

describe('sub-satellite points', () => {
  const straightUp = (upKm: number): Track => ({
    startMs: 0,
    stepMs: 60_000,
    knots: [0, 0, upKm, 0, 0, 0, 0, 0, upKm, 0, 0, 0],
  });

  it.each([
    [48.2, 11.6],
    [0, 0],
    [-78.5, 179.9],
    [90, 30],
    [-90, -30],
  ])('puts a satellite in the zenith of %f, %f over the observer', (latitudeDeg, longitudeDeg) => {
    const observer = { latitudeDeg, longitudeDeg, heightM: 540 };
    const point = subsatelliteAt(straightUp(35_000), observer, 30_000);
    expect(point.latitudeDeg).toBeCloseTo(latitudeDeg, 7);
    if (Math.abs(latitudeDeg) < 90) expect(point.longitudeDeg).toBeCloseTo(longitudeDeg, 7);
    expect(point.heightKm).toBeCloseTo(35_000.54, 5);
  });

  it('wraps the longitude at 180 deg', () => {
    const observer = { latitudeDeg: 0, longitudeDeg: 179, heightM: 0 };
    const track: Track = {
      startMs: 0,
      stepMs: 60_000,
      knots: [3000, 0, 500, 0, 0, 0, 3000, 0, 500, 0, 0, 0],
    };
    // 179 deg + atan(3000 / 6878.137).
    expect(subsatelliteAt(track, observer, 0).longitudeDeg).toBeCloseTo(179 + 23.56484 - 360, 3);
  });
});

describe('refraction for display', () => {
  // Meeus, Astronomical Algorithms, example 16.a (from memory): 24.618' at a true altitude of 33.246'.
  it('agrees with the worked example', () => {
    expect(60 * refractionDeg(33.246 / 60)).toBeCloseTo(24.618, 2);
  });

  it('is about 29 arc minutes at the geometric horizon and nothing in the zenith', () => {
    expect(60 * refractionDeg(0)).toBeGreaterThan(28);
    expect(60 * refractionDeg(0)).toBeLessThan(30);
    expect(60 * refractionDeg(90)).toBeLessThan(0.01);
    expect(refractionDeg(-5)).toBe(0);
  });

  it('falls with height and grows with the density of the air', () => {
    const heights = [0, 1, 2, 5, 10, 20, 45, 80].map((deg) => refractionDeg(deg));
    expect(heights).toEqual([...heights].sort((a, b) => b - a));
    expect(refractionDeg(5, { pressureHpa: 1030, temperatureC: -10 })).toBeGreaterThan(
      refractionDeg(5),
    );
  });
});
