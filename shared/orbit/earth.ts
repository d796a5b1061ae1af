/** Constants of the Earth that orbit and station geometry share. */

/** WGS 84 equatorial radius, km (NIMA TR8350.2, table 3.1). */
export const EARTH_RADIUS_KM = 6378.137;
/** WGS 84 flattening (NIMA TR8350.2, table 3.1). */
export const EARTH_FLATTENING = 1 / 298.257223563;
/** Square of the first eccentricity of the WGS 84 ellipsoid. */
export const ECCENTRICITY_SQUARED = EARTH_FLATTENING * (2 - EARTH_FLATTENING);

/** WGS 72 gravity parameter, km^3/s^2: the one SGP4 is defined with (AIAA 2006-6753, section III). */
export const SGP4_MU = 398600.8;
/** WGS 72 second zonal harmonic (AIAA 2006-6753). */
export const SGP4_J2 = 0.001082616;
/** WGS 72 equatorial radius, km (AIAA 2006-6753). */
export const SGP4_EARTH_RADIUS_KM = 6378.135;

/** Rate of Greenwich mean sidereal time, rad per second of UT1: 1.00273790935 turns a day (Aoki et al. 1982). */
export const EARTH_ROTATION_RAD_S = (2 * Math.PI * 1.00273790935) / 86_400;
