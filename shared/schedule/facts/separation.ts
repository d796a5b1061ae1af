import { halfPowerBeamwidthU } from '../../array/beamwidth.ts';
import { faceAxes, type FaceAxes } from '../../array/face-geometry.ts';
import type { LineTaper } from '../../array/taper.ts';
import { directionAt } from '../../orbit/track.ts';
import { dot } from '../../vector.ts';
import type { Direction, FaceModel, PassModel } from '../model.ts';

/**
 * Least separation in half-power beamwidths of the u-v plane: 1.25 for Taylor tapers at -25 to -30 dB, where the beam
 * has fallen to its design sidelobe; a uniform illumination needs 3 for 20 dB (common practice; reference section 4.9).
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

/** Square of the separation of two satellites in half-power beamwidths at an instant. */
export function separationSquared(
  beam: BeamWidths,
  a: PassModel,
  b: PassModel,
): (ms: number) => number {
  return (ms) => {
    const [toA, toB] = [directionAt(a.track, ms), directionAt(b.track, ms)];
    const du = (dot(toA, beam.axes.u) - dot(toB, beam.axes.u)) / beam.widthU;
    const dv = (dot(toA, beam.axes.v) - dot(toB, beam.axes.v)) / beam.widthV;
    return du * du + dv * dv;
  };
}
