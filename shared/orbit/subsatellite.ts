import { toDegrees, wrapDegrees } from '../units.ts';
import { EARTH_RADIUS_KM, ECCENTRICITY_SQUARED } from './earth.ts';
import { horizonFrame, type Observer } from './observer.ts';
import { stateAt, type Track } from './track.ts';

/** The point of the WGS 84 ellipsoid under the satellite, and the height above it. */
export interface SubsatellitePoint {
  latitudeDeg: number;
  /** East positive, -180 <= longitude < 180. */
  longitudeDeg: number;
  heightKm: number;
}

/** Fixed-point turns for the geodetic latitude: the error shrinks by about 1/150 with each. */
const LATITUDE_TURNS = 5;

/** Geodetic latitude, rad, and height of a point given by its distance from the axis and above the equator, km. */
function geodetic(axisDistanceKm: number, zKm: number): [number, number] {
  let latitude = Math.atan2(zKm, axisDistanceKm * (1 - ECCENTRICITY_SQUARED));
  for (let turn = 0; turn < LATITUDE_TURNS; turn++) {
    const sinLatitude = Math.sin(latitude);
    const primeVerticalKm =
      EARTH_RADIUS_KM / Math.sqrt(1 - ECCENTRICITY_SQUARED * sinLatitude ** 2);
    latitude = Math.atan2(
      zKm + primeVerticalKm * ECCENTRICITY_SQUARED * sinLatitude,
      axisDistanceKm,
    );
  }
  // This form of the height holds at the poles too, where cos(latitude) vanishes.
  const [sin, cos] = [Math.sin(latitude), Math.cos(latitude)];
  const surfaceKm = EARTH_RADIUS_KM * Math.sqrt(1 - ECCENTRICITY_SQUARED * sin ** 2);
  return [latitude, axisDistanceKm * cos + zKm * sin - surfaceKm];
}

/**
 * Sub-satellite point of a track seen by its observer: east-north-up to Earth-fixed to geodetic. As accurate as the
 * track (metres); converges for any height above -6,000 km.
 */
export function subsatelliteAt(track: Track, observer: Observer, ms: number): SubsatellitePoint {
  const frame = horizonFrame(observer);
  const { eastKm, northKm, upKm } = stateAt(track, ms);
  const meridianKm = frame.axisDistanceKm + frame.cosLatitude * upKm - frame.sinLatitude * northKm;
  const zKm = frame.zKm + frame.sinLatitude * upKm + frame.cosLatitude * northKm;
  const [latitude, heightKm] = geodetic(Math.hypot(meridianKm, eastKm), zKm);
  const east = observer.longitudeDeg + toDegrees(Math.atan2(eastKm, meridianKm));
  return {
    latitudeDeg: toDegrees(latitude),
    longitudeDeg: wrapDegrees(east + 180) - 180,
    heightKm,
  };
}
