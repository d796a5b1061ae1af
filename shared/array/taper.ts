import { chebyshevWeights } from './chebyshev.ts';

/** Amplitude taper along one axis of an array. `sidelobeDb` is the design level below the peak; its sign does not matter. */
export type LineTaper =
  | { kind: 'uniform' }
  | { kind: 'cosine'; power: number }
  | { kind: 'chebyshev'; sidelobeDb: number }
  | { kind: 'taylor'; sidelobeDb: number; nBar: number };

/** Parameters of a Taylor n-bar line source (T. T. Taylor 1955, from memory): A and the dilation sigma. */
export function taylorParameters(
  sidelobeDb: number,
  nBar: number,
): { a: number; dilation: number; idealBeamwidth: number } {
  const voltage = 10 ** (Math.abs(sidelobeDb) / 20);
  const a = Math.acosh(voltage) / Math.PI;
  const half = Math.acosh(voltage / Math.SQRT2);
  return {
    a,
    dilation: nBar / Math.hypot(a, nBar - 0.5),
    /** Half-power width of the ideal source, rad times wavelength over length. */
    idealBeamwidth: (2 / Math.PI) * Math.sqrt(Math.acosh(voltage) ** 2 - half ** 2),
  };
}

/** Taylor's coefficients F_1 .. F_(n-bar - 1) of the n-bar line source (from memory; equal to scipy). */
function taylorCoefficients(sidelobeDb: number, nBar: number): number[] {
  const { a, dilation } = taylorParameters(sidelobeDb, nBar);
  const orders = Array.from({ length: nBar - 1 }, (_, index) => index + 1);
  return orders.map((m) => {
    let numerator = (-1) ** (m + 1);
    let denominator = 2;
    for (const n of orders) {
      numerator *= 1 - m ** 2 / (dilation ** 2 * (a ** 2 + (n - 0.5) ** 2));
      if (n !== m) denominator *= 1 - m ** 2 / n ** 2;
    }
    return numerator / denominator;
  });
}

/** Amplitude weights at the centres of n equal elements, largest 1. */
export function taperWeights(taper: LineTaper, elements: number): number[] {
  if (taper.kind === 'uniform') return Array.from({ length: elements }, () => 1);
  if (taper.kind === 'chebyshev') return chebyshevWeights(taper.sidelobeDb, elements);
  const coefficients =
    taper.kind === 'taylor' ? taylorCoefficients(taper.sidelobeDb, taper.nBar) : [];
  const raw = Array.from({ length: elements }, (_, index) => {
    const x = (index - (elements - 1) / 2) / elements;
    if (taper.kind === 'cosine') return Math.cos(Math.PI * x) ** taper.power;
    return coefficients.reduce((sum, f, m) => sum + 2 * f * Math.cos(2 * Math.PI * (m + 1) * x), 1);
  });
  const largest = Math.max(...raw);
  return raw.map((weight) => weight / largest);
}

/** Taper efficiency of one axis, |sum a|^2 / (n sum a^2); both axes multiply (Mailloux). */
export function taperEfficiency(weights: readonly number[]): number {
  const sum = weights.reduce((total, a) => total + a, 0);
  const squares = weights.reduce((total, a) => total + a * a, 0);
  return sum ** 2 / (weights.length * squares);
}
