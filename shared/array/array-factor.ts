/**
 * Array factor of a line of elements, amplitude with sign, 1 at the beam's centre. `u` is the distance of the direction
 * cosine from the steered one, `pitch` in wavelengths; weights are symmetric (Balanis ch. 6). Exact.
 */
export function lineArrayFactor(weights: readonly number[], pitch: number, u: number): number {
  const centre = (weights.length - 1) / 2;
  let sum = 0;
  let total = 0;
  for (const [index, weight] of weights.entries()) {
    sum += weight * Math.cos(2 * Math.PI * (index - centre) * pitch * u);
    total += weight;
  }
  return sum / total;
}
