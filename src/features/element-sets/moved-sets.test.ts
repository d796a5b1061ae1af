import { describe, expect, it } from 'vitest';
import { linesAt, shiftBetween } from './moved-sets.ts';

const line1 = '1 91001U 26901A   26335.00000000  .00001200  00000+0  62000-4 0  9992';
const withAnomaly = (meanAnomalyDeg: number): string =>
  `2 91001  97.6200  40.0000 0012000  80.0000 ${meanAnomalyDeg.toFixed(4).padStart(8)} 15.05000000 10015`;
const at = Date.parse('2026-12-01T06:00:00Z');

describe('how far a fresh set moves a satellite', () => {
  it('is nothing between equal sets', () => {
    const lines = { line1, line2: withAnomaly(100) };
    const shift = shiftBetween(lines, lines, at);
    expect(shift?.lateSeconds).toBeCloseTo(0, 9);
    expect(shift?.crossTrackKm).toBeCloseTo(0, 9);
  });

  it('is the time of a mean anomaly: one degree less comes a 360th of the period later', () => {
    // Period 86400 / 15.05 = 5740.9 s; a degree is 15.947 s. Eccentricity 0.0012 leaves 0.5 %.
    const shift = shiftBetween(
      { line1, line2: withAnomaly(100) },
      { line1, line2: withAnomaly(99) },
      at,
    );
    expect(shift?.lateSeconds).toBeGreaterThan(15.947 * 0.995);
    expect(shift?.lateSeconds).toBeLessThan(15.947 * 1.005);
    expect(shift?.crossTrackKm).toBeLessThan(2);
  });
});

describe('finding a set in its file', () => {
  const file = ['QUERN 1', line1, withAnomaly(1), '', 'QUERN 2', line1, withAnomaly(2)];

  it('starts at the name line or at line 1', () => {
    expect(linesAt(file, 1)?.line2).toBe(withAnomaly(1));
    expect(linesAt(file, 6)?.line2).toBe(withAnomaly(2));
    expect(linesAt(file, 7)).toBeNull();
  });
});
