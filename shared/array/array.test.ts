import { describe, expect, it } from 'vitest';
import { toDegrees, toRadians } from '../units.ts';
import type { Vector3 } from '../vector.ts';
import { halfPowerBeamwidthRad, halfPowerBeamwidthU } from './beamwidth.ts';
import { directionFromFace, directionOnFace, faceAxes } from './face-geometry.ts';
import { gratingLobeOnsetRad, hardEndAngleRad } from './hard-end.ts';
import { scanAngleForLoss, scanLossDb } from './scan-loss.ts';
import { taperEfficiency, taperWeights, type LineTaper } from './taper.ts';
import { SPEED_OF_LIGHT_M_S } from './wavelength.ts';

// Expected numbers: engineering reference of the project, computed there independently with numpy/scipy.
const direction = (azimuthDeg: number, elevationDeg: number): Vector3 => {
  const [az, el] = [toRadians(azimuthDeg), toRadians(elevationDeg)];
  return [Math.cos(el) * Math.sin(az), Math.cos(el) * Math.cos(az), Math.sin(el)];
};
const face = (az: number, el: number, roll: number) => ({
  boresightAzimuthDeg: az,
  boresightElevationDeg: el,
  rollDeg: roll,
});
const uniform: LineTaper = { kind: 'uniform' };
const taylor25: LineTaper = { kind: 'taylor', sidelobeDb: -25, nBar: 4 };
const table: [number, number][] = [
  [0, 0],
  [10, 0.08],
  [20, 0.33],
  [30, 0.81],
  [40, 1.55],
  [50, 2.62],
  [60, 4.3],
  [65, 5.6],
  [70, 7.9],
];

describe('face geometry', () => {
  it.each([
    [200, 30, face(180, 45, 0), 0.2961981, -0.2218885, 0.9289953, 21.72127],
    [10, 80, face(0, 30, 15), -0.1694821, 0.7490206, 0.6405029, 50.17067],
    [350, 20, face(20, 40, -10), -0.5080472, -0.1755418, 0.8432515, 32.51492],
    [185, 10, face(0, 45, 0), -0.08583165, 0.8165022, -0.5709266, 124.8149],
  ])('puts azimuth %s elevation %s on the face', (az, el, orientation, u, v, w, thetaDeg) => {
    const on = directionOnFace(orientation, direction(az, el));
    expect(on.u).toBeCloseTo(u, 6);
    expect(on.v).toBeCloseTo(v, 6);
    expect(on.w).toBeCloseTo(w, 6);
    expect(toDegrees(on.scanAngleRad)).toBeCloseTo(thetaDeg, 4);
  });

  it('comes back from the u-v plane and has nothing outside the unit circle', () => {
    const axes = faceAxes(face(90, 60, 25));
    const back = directionFromFace(axes, -0.5, 0.4);
    expect(back && directionOnFace(face(90, 60, 25), back).u).toBeCloseTo(-0.5, 12);
    expect(directionFromFace(axes, 0.8, 0.6)).toBeNull();
  });
});

describe('scan loss', () => {
  it('follows the law and its inverse', () => {
    const law = { scanLossExponent: 1.3, scanLossTable: null };
    expect(scanLossDb(law, toRadians(45))).toBeCloseTo(1.956695, 5);
    expect(toDegrees(scanAngleForLoss(law, 4))).toBeCloseTo(60.50232, 4);
    expect(scanLossDb(law, toRadians(90))).toBeNull();
  });

  it('interpolates a table and never goes beyond its last row', () => {
    const measured = { scanLossExponent: 1, scanLossTable: table };
    expect(scanLossDb(measured, toRadians(37.5))).toBeCloseTo(1.365, 9);
    expect(scanLossDb(measured, toRadians(70))).toBe(7.9);
    expect(scanLossDb(measured, toRadians(71))).toBeNull();
    expect(toDegrees(scanAngleForLoss(measured, 3))).toBeCloseTo(52.2619, 4);
    expect(toDegrees(scanAngleForLoss(measured, 9))).toBeCloseTo(70, 9);
  });

  it('ends at the grating lobe before the loss allows', () => {
    // Onset spacing 0.5358984 wavelengths for 60 deg.
    const pitchMm = 0.5358984 * (SPEED_OF_LIGHT_M_S / 2290e6) * 1000;
    expect(toDegrees(gratingLobeOnsetRad(pitchMm, 2290))).toBeCloseTo(60, 4);
    const law = { scanLossExponent: 1.2, scanLossTable: null, hardEndDb: 6 };
    const hard = { ...law, pitchXMm: pitchMm, pitchYMm: 50 };
    expect(toDegrees(hardEndAngleRad(hard, 2290))).toBeCloseTo(60, 4);
    expect(hardEndAngleRad(hard, null)).toBe(scanAngleForLoss(law, 6));
  });
});

describe('taper and beamwidth', () => {
  it('gives the published Taylor weights and efficiency', () => {
    const expected = [0.4026949, 0.5916792, 0.8460677, 1, 1, 0.8460677, 0.5916792, 0.4026949];
    for (const [index, weight] of taperWeights(taylor25, 8).entries())
      expect(weight).toBeCloseTo(expected[index] ?? NaN, 6);
    expect(taperEfficiency(taperWeights(taylor25, 24))).toBeCloseTo(0.9052768, 6);
  });

  it.each([
    [10, 0.5, 0, uniform, 10.20918],
    [32, 0.5, 45, uniform, 4.49291],
    [24, 0.50922, 60, taylor25, 10.0403],
    [64, 0.4876, 55, taylor25, 3.385515],
  ])(
    'has the exact half-power width: %s elements at %s wavelengths, %s deg',
    (elements, wl, scan, taper, hpbwDeg) => {
      const pitchMm = wl * (SPEED_OF_LIGHT_M_S / 2e9) * 1000;
      const width = halfPowerBeamwidthRad({ elements, pitchMm, taper }, 2000, toRadians(scan));
      expect(toDegrees(width ?? NaN)).toBeCloseTo(hpbwDeg, 3);
    },
  );

  it('gives the width in u that separation counts in', () => {
    const pitchMm = 0.5 * (SPEED_OF_LIGHT_M_S / 2e9) * 1000;
    expect(halfPowerBeamwidthU({ elements: 32, pitchMm, taper: taylor25 }, 2000)).toBeCloseTo(
      0.06604752,
      7,
    );
    expect(halfPowerBeamwidthRad({ elements: 8, pitchMm, taper: taylor25 }, 2000, 1.5)).toBeNull();
  });
});
