import { anglesOf, directionOf } from '../array/direction.ts';
import { toDegrees, toRadians } from '../units.ts';
import { angleBetween, norm, type Vector3 } from '../vector.ts';

/** Radius of the ring, km. */
const RING_KM = 42_164.17;
const EQUATOR_KM = 6378.137;
const FLATTENING = 1 / 298.257223563;

export interface Site {
  latitudeDeg: number;
  longitudeDeg: number;
  heightKm: number;
}

/** From the station to a longitude of the geostationary ring, east-north-up, km (WGS 84). Exact. */
export function geostationaryVector(site: Site, satelliteLongitudeDeg: number): Vector3 {
  const [latitude, longitude] = [toRadians(site.latitudeDeg), toRadians(site.longitudeDeg)];
  const e2 = FLATTENING * (2 - FLATTENING);
  const n = EQUATOR_KM / Math.sqrt(1 - e2 * Math.sin(latitude) ** 2);
  const out = (n + site.heightKm) * Math.cos(latitude);
  const apart = toRadians(satelliteLongitudeDeg) - longitude;
  const [ahead, east] = [RING_KM * Math.cos(apart) - out, RING_KM * Math.sin(apart)];
  const alongAxis = -(n * (1 - e2) + site.heightKm) * Math.sin(latitude);
  return [
    east,
    -Math.sin(latitude) * ahead + Math.cos(latitude) * alongAxis,
    Math.cos(latitude) * ahead + Math.sin(latitude) * alongAxis,
  ];
}

/** Azimuth, elevation and range of a geostationary longitude. */
export function geostationaryLook(site: Site, satelliteLongitudeDeg: number) {
  const vector = geostationaryVector(site, satelliteLongitudeDeg);
  return { ...anglesOf(vector), rangeKm: norm(vector) };
}

/** Smallest angle, deg, between a direction and the arc above the horizon; null where no arc is in sight. To 0.001 deg. */
export function arcSeparationDeg(
  site: Site,
  look: { azimuthDeg: number; elevationDeg: number },
): number | null {
  const direction = directionOf(look.azimuthDeg, look.elevationDeg);
  const angle = (longitude: number): number => {
    const vector = geostationaryVector(site, longitude);
    return vector[2] < 0 ? Infinity : angleBetween(direction, vector);
  };
  let best = site.longitudeDeg;
  for (const step of [1, 0.02, 0.0004]) {
    const centre = best;
    const reach = step === 1 ? 82 : step * 60;
    for (let longitude = centre - reach; longitude <= centre + reach; longitude += step)
      if (angle(longitude) < angle(best)) best = longitude;
  }
  const least = angle(best);
  return least === Infinity ? null : toDegrees(least);
}
