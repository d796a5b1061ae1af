import { describe, expect, it } from 'vitest';
import {
  azimuth,
  compassPoint,
  counted,
  decimals,
  frequency,
  passWords,
  signed,
} from './format-number.ts';

describe('numbers as they stand on screen', () => {
  it('uses a true minus, a fixed count of decimals, and a dash for what is missing', () => {
    expect(decimals(-3.14, 1)).toBe('−3.1');
    expect(decimals(-0.04, 1)).toBe('0.0');
    expect([null, undefined, NaN].map((value) => decimals(value, 1))).toEqual(['–', '–', '–']);
    expect([signed(11.4, 1), signed(-3.1, 1), signed(0.02, 1)]).toEqual(['+11.4', '−3.1', '0.0']);
  });

  it('reads azimuths with three figures and the nearest of sixteen points', () => {
    expect([azimuth(12), azimuth(359.7)]).toEqual(['012', '000']);
    expect([11.24, 11.26, 348.8, 202.5].map(compassPoint)).toEqual(['N', 'NNE', 'N', 'SSW']);
    expect(passWords({ maxElevationDeg: 53.7, aosAzimuthDeg: 21, losAzimuthDeg: 268 })).toBe(
      'max 54°, NNE to W',
    );
  });

  it('counts in words and writes frequencies with thin groups', () => {
    expect([counted(1, 'pass', 'passes'), counted(0, 'pass', 'passes')]).toEqual([
      '1 pass',
      '0 passes',
    ]);
    expect(frequency(2262)).toBe('2 262.0');
  });
});
