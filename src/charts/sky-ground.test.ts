import { describe, expect, it } from 'vitest';
import { makeSkyGround, type GroundFace } from './sky-ground.ts';

const face: GroundFace = {
  id: 'f',
  label: 'North',
  boresightAzimuthDeg: 0,
  boresightElevationDeg: 50,
  rollDeg: 0,
  scanLossExponent: 1.2,
  scanLossTable: null,
  normalLimitDb: 3.6,
  hardEndDb: 4.4,
};
const station = {
  horizonMask: [
    { azimuthDeg: 0, elevationDeg: 3 },
    { azimuthDeg: 180, elevationDeg: 9 },
  ],
  keepOutSectors: [
    {
      label: 'road',
      azimuthFromDeg: 350,
      azimuthToDeg: 10,
      elevationFromDeg: 0,
      elevationToDeg: 12,
    },
  ],
};
const ground = makeSkyGround({ station, faces: [face], limitDb: 3.6 });

describe('the ground of the sky sheet', () => {
  it('draws whole decibels below the limit, then the limit', () => {
    const losses = ground
      .at(200)
      .faces[0]?.contours.map(({ lossDb, isLimit }) => [lossDb, isLimit]);
    expect(losses).toEqual([
      [1, false],
      [2, false],
      [3, false],
      [3.6, true],
    ]);
  });

  it('puts the foot of a contour at its scan angle behind the zenith', () => {
    // By hand: cos(theta) = 10^(-3.6 / 12), theta = 59.92 deg; straight over the zenith that is el 90 - (59.92 - 40).
    const theta = (Math.acos(10 ** (-3.6 / 12)) * 180) / Math.PI;
    const foot = ground.at(90).faces[0]?.contours.at(-1)?.foot;
    expect(foot?.[1]).toBeCloseTo(theta - 40, 1);
    expect(Math.abs(foot?.[0] ?? 9)).toBeLessThan(1);
  });

  it('keeps contours on the disc, follows the rim below the horizon', () => {
    const limit = ground.at(100).faces[0]?.contours.at(-1)?.d ?? '';
    const points = [...limit.matchAll(/(-?[\d.]+) (-?[\d.]+)/g)].map((m) => [
      Number(m[1]),
      Number(m[2]),
    ]);
    const radii = points.map(([x = 0, y = 0]) => Math.hypot(x, y));
    expect(Math.max(...radii)).toBeLessThan(100.02);
    // Boresight at 50 deg: 59.9 deg to the north ends 9.9 deg below the horizon.
    expect(radii.filter((r) => r > 99.98).length).toBeGreaterThan(4);
  });

  it('places a keep-out sector that passes north around north', () => {
    const [sector] = ground.at(90).keepOut;
    expect(sector?.middle[0]).toBeCloseTo(0, 6);
    expect(sector?.middle[1]).toBeCloseTo(-84, 6);
  });

  it('gives the same layers for the same radius', () => {
    expect(ground.at(36)).toBe(ground.at(36));
  });
});
