import { carrierToNoiseDensityDb, ebN0Db, modulatedCarrier } from '../../../shared/link/carrier.ts';
import { bestMode } from '../../../shared/link/coding.ts';
import { gasLossDb, zenithGasDb } from '../../../shared/link/gas.ts';
import {
  antennaNoiseK,
  gOverTDbK,
  noiseBehindLossK,
  noiseTemperatureK,
  skyNoiseK,
} from '../../../shared/link/noise.ts';
import { freeSpaceLossDb, powerFluxDensityDbw, slantGeometry } from '../../../shared/link/path.ts';
import { pointingLossDb, scannedPointingLossDb } from '../../../shared/link/pointing.ts';
import { polarisationLossDb } from '../../../shared/link/polarisation.ts';
import { rainCoefficients, rainLoss } from '../../../shared/link/rain.ts';
import { constantRateVolumeGbit, variableCodingVolume } from '../../../shared/link/volume.ts';
import type { QuantityTable } from './table.ts';

interface BudgetInputs {
  eirp_dbw: number;
  f_ghz: number;
  d_km: number;
  l_atm_db: number;
  l_scan_db: number;
  l_pol_db: number;
  l_point_db: number;
  gt_db_per_k: number;
  bit_rate_bps: number;
  required_ebn0_db: number;
  implementation_db: number;
}
interface NoiseInputs {
  a_zenith_db: number;
  el_deg: number;
  ground_share: number;
  feed_loss_db: number;
  t_rx_k: number;
  gain_dbi: number;
  scan_loss_db: number;
}
interface RainInputs {
  lat_deg: number;
  h_station_km: number;
  h_rain_km: number;
  r001_mm_h: number;
  f_ghz: number;
  el_deg: number;
  tau_deg: number;
  p_percent: number;
}

const budget = (one: BudgetInputs): object => {
  const losses = one.l_atm_db + one.l_scan_db + one.l_pol_db + one.l_point_db;
  const path = freeSpaceLossDb(one.f_ghz * 1000, one.d_km);
  const cn0 = carrierToNoiseDensityDb(one.eirp_dbw, path + losses, one.gt_db_per_k);
  const ebn0_db = ebN0Db(cn0, one.bit_rate_bps);
  const margin_db = ebn0_db - one.required_ebn0_db - one.implementation_db;
  return { cn0_dbhz: cn0, ebn0_db, margin_db };
};

const noise = (one: NoiseInputs): object => {
  const attenuation_db = gasLossDb(one.a_zenith_db, one.el_deg);
  const t_sky_k = skyNoiseK(attenuation_db);
  const t_ant_k = antennaNoiseK(t_sky_k, one.ground_share);
  const t_sys_k = noiseBehindLossK(t_ant_k, one.feed_loss_db, 290) + one.t_rx_k;
  const gt_db_per_k = gOverTDbK(one.gain_dbi - one.scan_loss_db, one.feed_loss_db, t_sys_k);
  return { attenuation_db, t_sky_k, t_ant_k, t_sys_k, gt_db_per_k };
};

const rain = (one: RainInputs): object => {
  const site = {
    latitudeDeg: one.lat_deg,
    heightKm: one.h_station_km,
    rainHeightKm: one.h_rain_km,
    rainRateMmH: one.r001_mm_h,
  };
  const path = {
    frequencyMhz: one.f_ghz * 1000,
    elevationDeg: one.el_deg,
    tiltDeg: one.tau_deg,
  };
  const { gammaDbKm, hundredthDb, lossDb } = rainLoss(site, path, one.p_percent);
  return { gamma_db_per_km: gammaDbKm, a001_db: hundredthDb, a_p_db: lossDb };
};

export const LINK: QuantityTable = {
  'LNK-FSL': ({ f_ghz, d_km }: { f_ghz: number; d_km: number }) => ({
    fsl_db: freeSpaceLossDb(f_ghz * 1000, d_km),
  }),
  'LNK-SLANT': ({ altitude_km, el_deg }: { altitude_km: number; el_deg: number }) => {
    const { rangeKm, centralDeg, nadirDeg } = slantGeometry(altitude_km, el_deg);
    return { range_km: rangeKm, central_deg: centralDeg, nadir_deg: nadirDeg };
  },
  'LNK-CN0': budget,
  'LNK-ES': (one: {
    cn0_dbhz: number;
    symbol_rate: number;
    efficiency_bit_per_symbol: number;
    roll_off: number;
  }) => {
    const carrier = modulatedCarrier(one.cn0_dbhz, {
      symbolRate: one.symbol_rate,
      bitPerSymbol: one.efficiency_bit_per_symbol,
      rollOff: one.roll_off,
    });
    return {
      esn0_db: carrier.esN0Db,
      ebn0_db: carrier.ebN0Db,
      bit_rate_bps: carrier.bitRateBps,
      bandwidth_hz: carrier.bandwidthHz,
    };
  },
  'LNK-NF': ({ nf_db }: { nf_db: number }) => ({ t_k: noiseTemperatureK(nf_db) }),
  'LNK-TSKY': (one: { attenuation_db: number; t_mr_k: number }) => ({
    t_sky_k: skyNoiseK(one.attenuation_db, one.t_mr_k),
  }),
  'LNK-GT': noise,
  'LNK-GAS': ({ a_zenith_db, el_deg }: { a_zenith_db: number; el_deg: number }) => ({
    attenuation_db: gasLossDb(a_zenith_db, el_deg),
  }),
  'LNK-GASZ': ({ f_ghz }: { f_ghz: number }) => ({ a_zenith_db: zenithGasDb(f_ghz * 1000) }),
  'LNK-838': (one: { f_ghz: number; el_deg: number; tau_deg: number; rain_mm_h: number }) => {
    const path = { elevationDeg: one.el_deg, tiltDeg: one.tau_deg };
    const { kH, alphaH, kV, alphaV, k, alpha } = rainCoefficients(one.f_ghz * 1000, path);
    const gamma_db_per_km = k * one.rain_mm_h ** alpha;
    return { k_h: kH, alpha_h: alphaH, k_v: kV, alpha_v: alphaV, k, alpha, gamma_db_per_km };
  },
  'LNK-618': rain,
  'LNK-POL': (one: {
    ar_wave_db: number;
    ar_antenna_db: number;
    tilt_deg: number;
    same_sense: boolean;
  }) => ({
    loss_db: polarisationLossDb(
      { axialRatioDb: one.ar_wave_db },
      { axialRatioDb: one.ar_antenna_db },
      { tiltDeg: one.tilt_deg, sameSense: one.same_sense },
    ),
  }),
  'LNK-PNT': ({ error_deg, hpbw_deg }: { error_deg: number; hpbw_deg: number }) => ({
    loss_db: pointingLossDb(error_deg, hpbw_deg),
  }),
  'LNK-PNT2': (one: {
    e_scan_plane_deg: number;
    hpbw_scan_plane_deg: number;
    e_cross_deg: number;
    hpbw_cross_deg: number;
  }) => ({
    loss_db: scannedPointingLossDb(
      { errorDeg: one.e_scan_plane_deg, hpbwDeg: one.hpbw_scan_plane_deg },
      { errorDeg: one.e_cross_deg, hpbwDeg: one.hpbw_cross_deg },
    ),
  }),
  'LNK-MOD': ({ esn0_db, margin_db }: { esn0_db: number; margin_db: number }) => {
    const mode = bestMode(esn0_db, margin_db);
    return { modcod: mode?.name ?? null, efficiency_bit_per_symbol: mode?.bitPerSymbol ?? 0 };
  },
  'LNK-VOL': (one: {
    bit_rate_bps: number;
    duration_s: number;
    setup_s: number;
    teardown_s: number;
    frame_efficiency: number;
  }) => ({
    volume_gbit: constantRateVolumeGbit(
      { bitRateBps: one.bit_rate_bps, frameEfficiency: one.frame_efficiency },
      { durationS: one.duration_s, setUpS: one.setup_s, tearDownS: one.teardown_s },
    ),
  }),
  'LNK-VCM': (one: {
    symbol_rate: number;
    margin_db: number;
    samples_t_s_esn0_db: [number, number][];
  }) => {
    const { modes, volumeGbit } = variableCodingVolume(
      one.samples_t_s_esn0_db.map(([seconds, esN0Db]) => ({ seconds, esN0Db })),
      { symbolRate: one.symbol_rate, marginDb: one.margin_db },
    );
    return { modcods: modes.map((mode) => mode?.name ?? null), volume_gbit: volumeGbit };
  },
  'LNK-PFD': (one: { eirp_dbw: number; d_km: number; bandwidth_hz: number }) => ({
    pfd_dbw_m2_4khz: powerFluxDensityDbw(one.eirp_dbw, one.d_km, one.bandwidth_hz / 1000),
  }),
};
