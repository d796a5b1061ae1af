import { toRadians } from '../units.ts';
import { EARTH_RADIUS_KM, ECCENTRICITY_SQUARED } from './earth.ts';

/** Where the observer stands: WGS 84 geodetic latitude and longitude (east positive), height above the ellipsoid. */
export interface Observer {
  latitudeDeg: number;
  longitudeDeg: number;
  heightM: number;
  /** UT1 - UTC of the time span, s; 0 when not given. |UT1 - UTC| < 0.9 s by definition. */
  ut1MinusUtcSeconds?: number | undefined;
}

/** The observer's place and horizon axes in the Earth-fixed frame, made once for an observer. */
export interface HorizonFrame {
  sinLatitude: number;
  cosLatitude: number;
  sinLongitude: number;
  cosLongitude: number;
  /** Earth-fixed position, km, in the meridian of the observer: distance from the axis and height above the equator. */
  axisDistanceKm: number;
  zKm: number;
  ut1MinusUtcSeconds: number;
}

/** East-north-up frame of an observer; up is the normal of the WGS 84 ellipsoid. */
export function horizonFrame(observer: Observer): HorizonFrame {
  const latitude = toRadians(observer.latitudeDeg);
  const longitude = toRadians(observer.longitudeDeg);
  const [sinLatitude, cosLatitude] = [Math.sin(latitude), Math.cos(latitude)];
  const primeVerticalKm = EARTH_RADIUS_KM / Math.sqrt(1 - ECCENTRICITY_SQUARED * sinLatitude ** 2);
  const heightKm = observer.heightM / 1000;
  return {
    sinLatitude,
    cosLatitude,
    sinLongitude: Math.sin(longitude),
    cosLongitude: Math.cos(longitude),
    axisDistanceKm: (primeVerticalKm + heightKm) * cosLatitude,
    zKm: (primeVerticalKm * (1 - ECCENTRICITY_SQUARED) + heightKm) * sinLatitude,
    ut1MinusUtcSeconds: observer.ut1MinusUtcSeconds ?? 0,
  };
}
