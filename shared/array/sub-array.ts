import { amplitudeToDb, lineArrayFactor } from './array-factor.ts';
import { halfPowerHalfWidthU } from './beamwidth.ts';
import { SPEED_OF_LIGHT_M_S } from './wavelength.ts';

/**
 * What a beam costs that is formed digitally du away from where its sub-arrays of m elements are steered (Mailloux,
 * from memory): loss, the first grating lobe and its level relative to the beam, and the sub-array's own half-width.
 * `pitch` in wavelengths. Beyond the half-width a hybrid face has no field of view.
 */
export function subArrayBeam({ elements, pitch }: { elements: number; pitch: number }, du: number) {
  const weights = Array.from({ length: elements }, () => 1);
  const levelDb = (u: number): number => amplitudeToDb(lineArrayFactor(weights, pitch, u));
  const gratingLobeU = du - Math.sign(du) / (elements * pitch);
  const axis = { elements, pitchMm: pitch * 1000, taper: { kind: 'uniform' as const } };
  return {
    lossDb: -levelDb(du),
    gratingLobeU,
    gratingLobeDb: levelDb(gratingLobeU) - levelDb(du),
    halfWidthU: halfPowerHalfWidthU(axis, SPEED_OF_LIGHT_M_S / 1e6),
  };
}
