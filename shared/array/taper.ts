/** Amplitude taper along one axis of an array. `sidelobeDb` is the design level below the peak; its sign does not matter. */
export type LineTaper = { kind: 'uniform' } | { kind: 'taylor'; sidelobeDb: number; nBar: number };

/** Taylor's coefficients F_1 .. F_(n-bar - 1) of the n-bar line source (T. T. Taylor 1955, from memory; equal to scipy). */
function taylorCoefficients(sidelobeDb: number, nBar: number): number[] {
  const a = Math.acosh(10 ** (Math.abs(sidelobeDb) / 20)) / Math.PI;
  const dilationSquared = nBar ** 2 / (a ** 2 + (nBar - 0.5) ** 2);
  const orders = Array.from({ length: nBar - 1 }, (_, index) => index + 1);
  return orders.map((m) => {
    let numerator = (-1) ** (m + 1);
    let denominator = 2;
    for (const n of orders) {
      numerator *= 1 - m ** 2 / (dilationSquared * (a ** 2 + (n - 0.5) ** 2));
      if (n !== m) denominator *= 1 - m ** 2 / n ** 2;
    }
    return numerator / denominator;
  });
}

/** Amplitude weights at the centres of n equal elements, largest 1. */
export function taperWeights(taper: LineTaper, elements: number): number[] {
  if (taper.kind === 'uniform') return Array.from({ length: elements }, () => 1);
  const coefficients = taylorCoefficients(taper.sidelobeDb, taper.nBar);
  const raw = Array.from({ length: elements }, (_, index) => {
    const x = (index - (elements - 1) / 2) / elements;
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
