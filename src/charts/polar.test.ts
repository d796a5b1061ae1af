import { describe, expect, it } from 'vitest';
import { directionFromAngles } from './beam-outline.ts';
import { directionPoint, polarPoint } from './polar.ts';

const close = (point: readonly [number, number], x: number, y: number): void => {
  expect(point[0]).toBeCloseTo(x, 9);
  expect(point[1]).toBeCloseTo(y, 9);
};

describe('the sky as an equidistant polar plot', () => {
  it('puts the zenith in the middle, north up and east to the right', () => {
    close(polarPoint(123, 90, 200), 0, 0);
    close(polarPoint(0, 0, 200), 0, -200);
    close(polarPoint(90, 0, 200), 200, 0);
    close(polarPoint(180, 45, 200), 0, 100);
  });

  it('places a direction where its azimuth and elevation place it', () => {
    for (const [azimuth, elevation] of [
      [12, 8],
      [200, 61],
      [347.5, 33.3],
    ] as const) {
      const [x, y] = polarPoint(azimuth, elevation, 137);
      close(directionPoint(directionFromAngles(azimuth, elevation), 137), x, y);
    }
  });

  it('lets r grow beyond the rim below the horizon', () => {
    const [x, y] = directionPoint(directionFromAngles(90, -9), 100);
    expect(Math.hypot(x, y)).toBeCloseTo(110, 9);
  });
});
