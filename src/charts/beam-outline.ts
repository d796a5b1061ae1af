import { halfPowerHalfWidthU } from '../../shared/array/beamwidth.ts';
import {
  directionFromFace,
  directionOnAxes,
  faceAxes,
  type FaceOrientation,
} from '../../shared/array/face-geometry.ts';
import type { Face } from '../../shared/schemas/face.ts';
import { toRadians } from '../../shared/units.ts';
import type { Vector3 } from '../../shared/vector.ts';
import { directionPoint, type Point } from './polar.ts';

/** Half widths of the half-power beam in direction cosine, along the face's two axes. */
export interface BeamWidths {
  u: number;
  v: number;
}

const known = new Map<string, BeamWidths>();

/** In the u-v plane a beam has one size whatever its direction; found once for a face, a taper and a frequency. */
export function beamWidths(
  face: Face,
  direction: 'receive' | 'transmit',
  frequencyMhz: number,
): BeamWidths {
  const key = `${face.id} ${face.version} ${direction} ${frequencyMhz}`;
  const found = known.get(key);
  if (found) return found;
  const taper = direction === 'receive' ? face.receiveTaper : face.transmitTaper;
  const widths = {
    u: halfPowerHalfWidthU(
      { elements: face.elementsX, pitchMm: face.pitchXMm, taper },
      frequencyMhz,
    ),
    v: halfPowerHalfWidthU(
      { elements: face.elementsY, pitchMm: face.pitchYMm, taper },
      frequencyMhz,
    ),
  };
  known.set(key, widths);
  return widths;
}

/** The half-power circle of the u-v plane carried back to the sky sheet: broadened by scan. */
export function beamOutline(
  face: FaceOrientation,
  centre: Vector3,
  { widths, radius }: { widths: BeamWidths; radius: number },
): Point[] {
  const axes = faceAxes(face);
  const { u, v, w } = directionOnAxes(axes, centre);
  if (w <= 0) return [];
  return Array.from({ length: 72 }, (_, i) => {
    const turn = (i * Math.PI) / 36;
    const direction = directionFromFace(
      axes,
      u + widths.u * Math.cos(turn),
      v + widths.v * Math.sin(turn),
    );
    return direction && directionPoint(direction, radius);
  }).filter((point): point is Point => point !== null);
}

/** Unit east-north-up direction of azimuth and elevation. */
export const directionFromAngles = (azimuthDeg: number, elevationDeg: number): Vector3 => {
  const [azimuth, elevation] = [toRadians(azimuthDeg), toRadians(elevationDeg)];
  const horizontal = Math.cos(elevation);
  return [horizontal * Math.sin(azimuth), horizontal * Math.cos(azimuth), Math.sin(elevation)];
};
