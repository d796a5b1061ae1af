import { toDegrees, toRadians, wrapDegrees } from '../../../../shared/units.ts';

/** Mean Earth radius for pictures of the map; positions themselves come from the WGS 84 tracks. */
export const MAP_EARTH_KM = 6371;

export interface GroundPoint {
  latitudeDeg: number;
  longitudeDeg: number;
}

/** Great-circle arc, rad, and initial bearing, rad, from one point to another. */
export function arcAndBearing(
  from: GroundPoint,
  to: GroundPoint,
): { arc: number; bearing: number } {
  const [lat1, lat2] = [toRadians(from.latitudeDeg), toRadians(to.latitudeDeg)];
  const dLon = toRadians(to.longitudeDeg - from.longitudeDeg);
  const y = Math.sin(dLon) * Math.cos(lat2);
  const x = Math.cos(lat1) * Math.sin(lat2) - Math.sin(lat1) * Math.cos(lat2) * Math.cos(dLon);
  const z = Math.sin(lat1) * Math.sin(lat2) + Math.cos(lat1) * Math.cos(lat2) * Math.cos(dLon);
  return { arc: Math.atan2(Math.hypot(x, y), z), bearing: Math.atan2(y, x) };
}

/** The point at an arc and bearing, both rad, from another. */
export function destination(from: GroundPoint, arc: number, bearing: number): GroundPoint {
  const lat1 = toRadians(from.latitudeDeg);
  const sinLat =
    Math.sin(lat1) * Math.cos(arc) + Math.cos(lat1) * Math.sin(arc) * Math.cos(bearing);
  const y = Math.sin(bearing) * Math.sin(arc) * Math.cos(lat1);
  const x = Math.cos(arc) - Math.sin(lat1) * sinLat;
  const longitude = from.longitudeDeg + toDegrees(Math.atan2(y, x));
  return {
    latitudeDeg: toDegrees(Math.asin(Math.max(-1, Math.min(1, sinLat)))),
    longitudeDeg: wrapDegrees(longitude + 180) - 180,
  };
}

/** Arc, rad, from the station to the point under a satellite at a height that is seen at an elevation (spherical Earth). */
export const arcAtElevation = (elevationDeg: number, heightKm: number): number => {
  const elevation = toRadians(elevationDeg);
  const ratio = MAP_EARTH_KM / (MAP_EARTH_KM + heightKm);
  return Math.acos(Math.max(-1, Math.min(1, ratio * Math.cos(elevation)))) - elevation;
};
