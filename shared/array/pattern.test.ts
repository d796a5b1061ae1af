import { describe, expect, it } from 'vitest';
import { arrayFactorDb, lineArrayFactor } from './array-factor.ts';
import { patternEnvelopeDb } from './pattern-envelope.ts';
import { taperWeights, type LineTaper } from './taper.ts';

const tapers: LineTaper[] = [
  { kind: 'uniform' },
  { kind: 'taylor', sidelobeDb: -25, nBar: 4 },
  { kind: 'chebyshev', sidelobeDb: 30 },
  { kind: 'cosine', power: 1 },
];

describe('array factor', () => {
  it.each([9, 16, 24])('equals the plain sum over %s elements', (count) => {
    for (const taper of tapers) {
      const weights = taperWeights(taper, count);
      for (let u = -2; u <= 2; u += 0.0137) {
        let [re, im, total] = [0, 0, 0];
        for (const [n, weight] of weights.entries()) {
          re += weight * Math.cos(2 * Math.PI * 0.52 * n * u);
          im += weight * Math.sin(2 * Math.PI * 0.52 * n * u);
          total += weight;
        }
        expect(Math.abs(lineArrayFactor(weights, 0.52, u))).toBeCloseTo(
          Math.hypot(re, im) / total,
          11,
        );
      }
    }
  });

  it('cuts nulls off at -200 dB', () => {
    const line = { weights: taperWeights({ kind: 'uniform' }, 10), pitch: 0.5 };
    expect(arrayFactorDb({ u: line, v: line }, 0.2, 0)).toBeGreaterThanOrEqual(-400);
    expect(arrayFactorDb({ u: line, v: line }, 0, 0)).toBeCloseTo(0, 12);
  });
});

describe('pattern envelope', () => {
  it('is never below the pattern from a distance on, grating lobe included', () => {
    for (const taper of tapers) {
      const weights = taperWeights(taper, 24);
      const bound = patternEnvelopeDb({ weights, pitch: 0.6 });
      for (let u = 0; u < 1.99; u += 0.003) {
        const level = 20 * Math.log10(Math.abs(lineArrayFactor(weights, 0.6, u)) + 1e-12);
        expect(bound(u)).toBeGreaterThanOrEqual(level - 1e-9);
        expect(bound(u)).toBeGreaterThanOrEqual(bound(u + 0.05));
      }
    }
  });
});
