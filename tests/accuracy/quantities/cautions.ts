import { wavelengthM } from '../../../shared/array/wavelength.ts';
import { elementAgeEffect, largestElementAgeDays } from '../../../shared/link/element-age.ts';
import {
  apertureFields,
  exposureDistanceM,
  exposureLevels,
  powerDensityWM2,
} from '../../../shared/link/exposure.ts';
import { arcSeparationDeg, geostationaryLook } from '../../../shared/link/geostationary.ts';
import { sunLook, sunOutage, sunZoneDeg } from '../../../shared/link/sun.ts';
import {
  horizonEirpLimit,
  leastTransmitElevation,
  type RadioService,
} from '../../../shared/link/transmit-elevation.ts';
import { fromIso } from '../../../shared/time.ts';
import type { QuantityTable } from './table.ts';

interface SiteInputs {
  lat_deg: number;
  lon_deg: number;
  height_km: number;
}
const siteOf = ({ lat_deg, lon_deg, height_km }: SiteInputs) => ({
  latitudeDeg: lat_deg,
  longitudeDeg: lon_deg,
  heightKm: height_km,
});
interface AgeInputs {
  error_at_epoch_km: number;
  altitude_km: number;
  el_deg: number;
  hpbw_deg: number;
}
const lookOf = (one: AgeInputs) => ({
  altitudeKm: one.altitude_km,
  elevationDeg: one.el_deg,
  hpbwDeg: one.hpbw_deg,
});

export const CAUTIONS: QuantityTable = {
  'CAU-MINEL': ({ service }: { service: RadioService }) => ({
    min_el_deg: leastTransmitElevation(service).value,
  }),
  'CAU-HOR': ({ f_ghz, horizon_el_deg }: { f_ghz: number; horizon_el_deg: number }) => {
    const { limitDbw, perBandwidth } = horizonEirpLimit(f_ghz * 1000, horizon_el_deg);
    return { limit: limitDbw, unit: `dBW/${perBandwidth}` };
  },
  'CAU-GSOL': (one: SiteInputs & { sat_lon_deg: number }) => {
    const { azimuthDeg, elevationDeg, rangeKm } = geostationaryLook(siteOf(one), one.sat_lon_deg);
    return { az_deg: azimuthDeg, el_deg: elevationDeg, range_km: rangeKm };
  },
  'CAU-GSOS': (one: SiteInputs & { az_deg: number; el_deg: number }) => ({
    separation_deg: arcSeparationDeg(siteOf(one), {
      azimuthDeg: one.az_deg,
      elevationDeg: one.el_deg,
    }),
  }),
  'CAU-SUN': (one: { utc: string; lat_deg: number; lon_deg: number }) => {
    const place = { latitudeDeg: one.lat_deg, longitudeDeg: one.lon_deg };
    const { azimuthDeg, elevationDeg } = sunLook(place, fromIso(one.utc));
    return { az_deg: azimuthDeg, el_deg: elevationDeg };
  },
  'CAU-SUNR': (one: { hpbw_deg: number; solar_radius_deg: number }) => {
    const zoneDeg = sunZoneDeg(one.hpbw_deg, one.solar_radius_deg);
    const { longestMinutes, days } = sunOutage(zoneDeg);
    return { radius_deg: zoneDeg, geo_duration_max_min: longestMinutes, geo_days: days };
  },
  'CAU-EXP': ({ f_ghz, occupational }: { f_ghz: number; occupational: boolean }) => {
    const { wholeBodyWM2, localWM2 } = exposureLevels(f_ghz * 1000, occupational);
    return { whole_body_w_m2: wholeBodyWM2, local_w_m2: localWM2 };
  },
  'CAU-NEAR': (one: {
    power_w: number;
    area_m2: number;
    f_ghz: number;
    efficiency: number;
    distance_m: number;
  }) => {
    const aperture = {
      powerW: one.power_w,
      areaM2: one.area_m2,
      wavelengthM: wavelengthM(one.f_ghz * 1000),
      efficiency: one.efficiency,
    };
    const fields = apertureFields(aperture);
    return {
      surface_w_m2: fields.surfaceWM2,
      near_field_w_m2: fields.nearFieldWM2,
      near_field_extent_m: fields.nearFieldExtentM,
      far_field_from_m: fields.farFieldFromM,
      at_distance_w_m2: powerDensityWM2(aperture, one.distance_m),
    };
  },
  'CAU-DIST': ({ eirp_dbw, limit_w_m2 }: { eirp_dbw: number; limit_w_m2: number }) => ({
    distance_m: exposureDistanceM(eirp_dbw, limit_w_m2),
  }),
  'CAU-AGE': (one: AgeInputs & { growth_km_per_day: number; age_days: number }) => {
    const aging = {
      atEpochKm: one.error_at_epoch_km,
      growthKmPerDay: one.growth_km_per_day,
      ageDays: one.age_days,
    };
    const effect = elementAgeEffect(aging, lookOf(one));
    return {
      along_track_km: effect.alongTrackKm,
      time_shift_s: effect.timeShiftS,
      range_km: effect.rangeKm,
      worst_angle_deg: effect.worstAngleDeg,
      loss_db: effect.lossDb,
    };
  },
  'CAU-AGEMAX': (one: AgeInputs & { growth_km_per_day: number; loss_limit_db: number }) => {
    const aging = { atEpochKm: one.error_at_epoch_km, growthKmPerDay: one.growth_km_per_day };
    return { age_days: largestElementAgeDays(aging, lookOf(one), one.loss_limit_db) };
  },
};
