import { wrapDegrees } from '../units.ts';
import type { KeepOutSector, MaskKnot } from './model.ts';

/**
 * Elevation of the horizon mask by azimuth, deg: linear between knots, around north too; 0 without knots. Made once for
 * a mask, asked often.
 */
export function maskProfile(mask: readonly MaskKnot[]): (azimuthDeg: number) => number {
  const knots = [...mask].sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  const [first, last] = [knots[0], knots.at(-1)];
  if (!first || !last) return () => 0;
  const around = [
    { ...last, azimuthDeg: last.azimuthDeg - 360 },
    ...knots,
    { ...first, azimuthDeg: first.azimuthDeg + 360 },
  ];
  return (azimuthDeg) => {
    const azimuth = wrapDegrees(azimuthDeg);
    const index = around.findIndex((knot) => knot.azimuthDeg > azimuth);
    const [before, after] = [around[index - 1] ?? last, around[index] ?? last];
    const span = after.azimuthDeg - before.azimuthDeg;
    if (span <= 0) return before.elevationDeg;
    const share = (azimuth - before.azimuthDeg) / span;
    return before.elevationDeg + share * (after.elevationDeg - before.elevationDeg);
  };
}

/**
 * How far, deg, a direction lies inside a keep-out sector; negative outside. The azimuth runs clockwise from the first
 * to the last; equal ones (or 0 to 360) mean the whole circle.
 */
export function depthInSectorDeg(
  sector: KeepOutSector,
  azimuthDeg: number,
  elevationDeg: number,
): number {
  const width = wrapDegrees(sector.azimuthToDeg - sector.azimuthFromDeg) || 360;
  const offset = wrapDegrees(azimuthDeg - sector.azimuthFromDeg);
  const inside =
    offset <= width ? Math.min(offset, width - offset) : -Math.min(offset - width, 360 - offset);
  const azimuthDepth = width === 360 ? Infinity : inside;
  return Math.min(
    azimuthDepth,
    elevationDeg - sector.elevationFromDeg,
    sector.elevationToDeg - elevationDeg,
  );
}
