import { describe, expect, it } from 'vitest';
import { toDegrees, toRadians } from '../units.ts';
import { maskAt, maskProfile } from './horizon-mask.ts';
import type { HorizonMask } from './pass.ts';

const elevationDeg = (mask: HorizonMask, azimuthDeg: number): number =>
  toDegrees(maskAt(maskProfile(mask), toRadians(azimuthDeg)).elevation);

describe('horizon masks', () => {
  it('are the same all around when uniform', () => {
    expect(elevationDeg(5, 123)).toBeCloseTo(5, 12);
    expect(elevationDeg([[40, 7]], 123)).toBeCloseTo(7, 12);
    expect(
      elevationDeg(
        [
          [40, 7],
          [90, 7],
        ],
        300,
      ),
    ).toBeCloseTo(7, 12);
  });

  it('are linear between knots, around north too', () => {
    const mask: HorizonMask = [
      [10, 4],
      [100, 13],
      [350, 8],
    ];
    expect(elevationDeg(mask, 10)).toBeCloseTo(4, 12);
    expect(elevationDeg(mask, 40)).toBeCloseTo(7, 12);
    // From (350, 8) to (370, 4): 0.2 deg a degree.
    expect(elevationDeg(mask, 355)).toBeCloseTo(7, 12);
    expect(elevationDeg(mask, 0)).toBeCloseTo(6, 12);
    expect(elevationDeg(mask, -5)).toBeCloseTo(7, 12);
    expect(elevationDeg(mask, 5)).toBeCloseTo(5, 12);
  });

  it('know their lowest elevation and their steepest slope', () => {
    const profile = maskProfile([
      [10, 4],
      [100, 13],
      [350, 8],
    ]);
    expect(toDegrees(profile.lowestRad)).toBeCloseTo(4, 12);
    expect(profile.steepestSlope).toBeCloseTo(0.2, 12);
    expect(maskAt(profile, toRadians(355)).slope).toBeCloseTo(-0.2, 12);
  });
});
