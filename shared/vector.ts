/** Vectors in three dimensions: [east, north, up] in the station's frame unless a name says otherwise. */
export type Vector3 = readonly [number, number, number];

export const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const scale = (a: Vector3, k: number): Vector3 => [a[0] * k, a[1] * k, a[2] * k];
export const add = (a: Vector3, b: Vector3): Vector3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const norm = (a: Vector3): number => Math.hypot(a[0], a[1], a[2]);
export const unit = (a: Vector3): Vector3 => scale(a, 1 / norm(a));
/** Angle between two vectors, rad: atan2 keeps the digits that acos loses near 0. */
export const angleBetween = (a: Vector3, b: Vector3): number =>
  Math.atan2(norm(cross(a, b)), dot(a, b));
