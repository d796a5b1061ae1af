import { halfPowerBeamwidthU } from '../../array/beamwidth.ts';
import { faceAxes, type FaceAxes, type FaceDirection } from '../../array/face-geometry.ts';
import type { LineTaper } from '../../array/taper.ts';
import type { Direction, FaceModel } from '../model.ts';

/**
 * Separation in half-power beamwidths of the u-v plane at which a beam has fallen to its design sidelobe: 1.25 for Taylor
 * tapers at -25 to -30 dB; a uniform illumination needs 3 for 20 dB (common practice; reference section 4.9). For display:
 * what decides is the interference.
 */
export const requiredHpbw = (taper: LineTaper): number => (taper.kind === 'taylor' ? 1.25 : 3);

export const taperOf = (face: FaceModel, direction: Direction): LineTaper =>
  direction === 'receive' ? face.receiveTaper : face.transmitTaper;

/** The beam of a face at a frequency: half-power widths along u and v. */
export interface BeamWidths {
  axes: FaceAxes;
  widthU: number;
  widthV: number;
}

export function beamWidths(
  face: FaceModel,
  direction: Direction,
  frequencyMhz: number,
): BeamWidths {
  const taper = taperOf(face, direction);
  const width = (elements: number, pitchMm: number): number =>
    halfPowerBeamwidthU({ elements, pitchMm, taper }, frequencyMhz);
  return {
    axes: faceAxes(face),
    widthU: width(face.elementsX, face.pitchXMm),
    widthV: width(face.elementsY, face.pitchYMm),
  };
}

/** How far two directions on a face are apart, in half-power beamwidths of the u-v plane. */
export const separationHpbw = (
  { widthU, widthV }: Pick<BeamWidths, 'widthU' | 'widthV'>,
  a: FaceDirection,
  b: FaceDirection,
): number => Math.hypot((a.u - b.u) / widthU, (a.v - b.v) / widthV);
