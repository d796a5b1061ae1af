import { toDegrees, toRadians } from '../../shared/units.ts';
import type { Vector3 } from '../../shared/vector.ts';

/** Equidistant polar plot: r = R (90 - el) / 90, azimuth clockwise, north up, zenith in the middle. */
export type Point = readonly [x: number, y: number];

export const polarPoint = (azimuthDeg: number, elevationDeg: number, radius: number): Point => {
  const r = (radius * (90 - elevationDeg)) / 90;
  const azimuth = toRadians(azimuthDeg);
  return [r * Math.sin(azimuth), -r * Math.cos(azimuth)];
};

/** Where a unit east-north-up direction stands on the sheet; below the horizon r grows beyond the rim. */
export const directionPoint = ([east, north, up]: Vector3, radius: number): Point => {
  const horizontal = Math.hypot(east, north);
  const elevationDeg = toDegrees(Math.atan2(up, horizontal));
  const r = (radius * (90 - elevationDeg)) / 90;
  return horizontal < 1e-12 ? [0, -r] : [(r * east) / horizontal, (-r * north) / horizontal];
};

const short = (value: number): string => value.toFixed(2);

/** An SVG path through points. */
export const pathThrough = (points: readonly Point[], close = false): string =>
  points.length === 0
    ? ''
    : `M${points.map(([x, y]) => `${short(x)} ${short(y)}`).join('L')}${close ? 'Z' : ''}`;

/** A circle as a path, for even-odd fills. */
export const circlePath = (radius: number): string =>
  `M0 ${short(-radius)}A${short(radius)} ${short(radius)} 0 1 1 0 ${short(radius)}A${short(radius)} ${short(radius)} 0 1 1 0 ${short(-radius)}Z`;
