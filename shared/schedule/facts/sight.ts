import { toDegrees, toRadians, wrapDegrees } from '../../units.ts';
import { dot, type Vector3 } from '../../vector.ts';
import { depthInSectorDeg, maskProfile } from '../horizon.ts';
import type { Direction, StationModel } from '../model.ts';
import type { Reading } from './sampling.ts';

const elevationOf = (direction: Vector3): number => toDegrees(Math.asin(Math.min(1, direction[2])));
const azimuthOf = (direction: Vector3): number =>
  wrapDegrees(toDegrees(Math.atan2(direction[0], direction[1])));

/** The elevation floor of a direction of the station. */
export const floorDeg = (station: StationModel, direction: Direction): number =>
  direction === 'receive' ? station.receiveElevationFloorDeg : station.transmitElevationFloorDeg;

/** What the station itself allows of a direction: elevation floor, mask and, to transmit, no keep-out sector. */
export function sightConditions(station: StationModel, direction: Direction): Reading[] {
  const sineOfFloor = Math.sin(toRadians(floorDeg(station, direction)));
  const maskDeg = maskProfile(station.horizonMask);
  const conditions: Reading[] = [(s) => s[2] - sineOfFloor];
  if (station.horizonMask.length > 0)
    conditions.push((s) => elevationOf(s) - maskDeg(azimuthOf(s)));
  if (direction === 'receive') return conditions;
  const sectors = station.keepOutSectors.map(
    (sector): Reading =>
      (s) =>
        -depthInSectorDeg(sector, azimuthOf(s), elevationOf(s)),
  );
  return [...conditions, ...sectors];
}

/** Within a scan angle of a face's normal; compared as cosines, which turn smoothly. */
export function scanCondition(normal: Vector3, largestRad: number): Reading {
  const cosine = Math.cos(largestRad);
  return (s) => dot(s, normal) - cosine;
}
