/** Below this the pattern counts as a null, dB. */
const NULL_DB = -200;

/**
 * Array factor of a line of elements, amplitude with sign, 1 at the beam's centre. `u` is the distance of the direction
 * cosine from the steered one, `pitch` in wavelengths; weights are symmetric (Balanis ch. 6, from memory). Exact.
 */
export function lineArrayFactor(weights: readonly number[], pitch: number, u: number): number {
  const count = weights.length;
  const x = 2 * Math.PI * pitch * u;
  // Symmetric pairs and the recurrence of cosines: one cosine a call instead of one an element.
  const twice = 2 * Math.cos(x);
  let angleCosine = count % 2 === 0 ? Math.cos(x / 2) : 1;
  let before = count % 2 === 0 ? angleCosine : twice / 2;
  let [sum, total] = [0, 0];
  for (let index = count >> 1; index < count; index++) {
    const weight = weights[index] ?? NaN;
    const share = count % 2 === 1 && index === count >> 1 ? 1 : 2;
    sum += share * weight * angleCosine;
    total += share * weight;
    [angleCosine, before] = [twice * angleCosine - before, angleCosine];
  }
  return sum / total;
}

/** Amplitude to dB, nulls cut off at -200 dB. */
export const amplitudeToDb = (amplitude: number): number =>
  Math.max(NULL_DB, 20 * Math.log10(Math.abs(amplitude)));

/** A line of elements, ready for many looks: weights and pitch in wavelengths. */
export interface LinePattern {
  weights: readonly number[];
  pitch: number;
}

/** A beam of a rectangular array with separable taper. */
export interface BeamPattern {
  u: LinePattern;
  v: LinePattern;
}

/** Array factor, dB, of a beam seen du and dv from its centre, both distances of direction cosines. Exact, no floor. */
export const arrayFactorDb = (beam: BeamPattern, du: number, dv: number): number =>
  amplitudeToDb(
    lineArrayFactor(beam.u.weights, beam.u.pitch, du) *
      lineArrayFactor(beam.v.weights, beam.v.pitch, dv),
  );
