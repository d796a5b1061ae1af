import { faceAxes } from '../../../../shared/array/face-geometry.ts';
import { scanAngleForLoss } from '../../../../shared/array/scan-loss.ts';
import { maskAt, maskProfile } from '../../../../shared/orbit/horizon-mask.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { toDegrees, toRadians } from '../../../../shared/units.ts';
import { add, scale } from '../../../../shared/vector.ts';
import { arcAtElevation, destination, type GroundPoint } from './station-projection.ts';

/** Azimuth and elevation of points all around the sky that a face serves: within the limit, above mask and floor. */
export function skyLimit(
  station: Station,
  face: Face,
  limitDb: number,
): { azimuthDeg: number; elevationDeg: number }[] {
  const axes = faceAxes(face);
  const angle = scanAngleForLoss(face, Math.min(limitDb, face.hardEndDb));
  const profile = maskProfile(
    station.horizonMask.map(({ azimuthDeg, elevationDeg }) => [azimuthDeg, elevationDeg] as const),
  );
  return Array.from({ length: 180 }, (_, i) => {
    const psi = toRadians(i * 2);
    const across = add(scale(axes.u, Math.cos(psi)), scale(axes.v, Math.sin(psi)));
    const [east, north, up] = add(
      scale(axes.normal, Math.cos(angle)),
      scale(across, Math.sin(angle)),
    );
    const azimuth = Math.atan2(east, north);
    const floor = Math.max(
      station.receiveElevationFloorDeg,
      toDegrees(maskAt(profile, (azimuth + 2 * Math.PI) % (2 * Math.PI)).elevation),
    );
    const elevationDeg = toDegrees(Math.atan2(up, Math.hypot(east, north)));
    return { azimuthDeg: toDegrees(azimuth), elevationDeg: Math.max(floor, elevationDeg) };
  });
}

/** Where satellites of one height stand while a face can serve them: a ring on the map. */
export const coverageRing = (
  { station, face, limitDb }: { station: Station; face: Face; limitDb: number },
  heightKm: number,
): GroundPoint[] =>
  skyLimit(station, face, limitDb).map(({ azimuthDeg, elevationDeg }) =>
    destination(station, arcAtElevation(elevationDeg, heightKm), toRadians(azimuthDeg)),
  );

/** All points under satellites of one height that are seen at one elevation. */
export const elevationRing = (
  station: GroundPoint,
  elevationDeg: number,
  heightKm: number,
): GroundPoint[] =>
  Array.from({ length: 121 }, (_, i) =>
    destination(station, arcAtElevation(elevationDeg, heightKm), toRadians(i * 3)),
  );
