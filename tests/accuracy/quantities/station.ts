import { scanLossDb } from '../../../shared/array/scan-loss.ts';
import { faceFigures, type FiguredFace } from '../../../shared/link/face-figures.ts';
import { NOISELESS_BACK_END } from '../../../shared/link/noise.ts';
import { powerToDb, toRadians } from '../../../shared/units.ts';
import type { QuantityTable } from './table.ts';
import { taperOf } from './taper-of.ts';

interface StationInputs {
  nx: number;
  ny: number;
  pitch_mm: number;
  f_rx_ghz: number;
  f_tx_ghz?: number;
  f_max_ghz: number;
  radiation_efficiency: number;
  rx_taper: string;
  rx_sll_db: number;
  rx_nbar: number;
  tx_taper?: string;
  t_ant_k: number;
  feed_loss_db: number;
  lna_nf_db: number;
  lna_gain_db?: number;
  n_split?: number;
  split_excess_db?: number;
  second_nf_db?: number;
  w_per_element?: number;
  tx_loss_db?: number;
  n_tx_beams?: number;
  output_backoff_db?: number;
  scan_n: number;
  theta_max_deg: number;
  az0_deg: number;
  el0_deg: number;
}

function faceOf(one: StationInputs): FiguredFace {
  const curve = { scanLossExponent: one.scan_n, scanLossTable: null };
  const limitDb = scanLossDb(curve, toRadians(one.theta_max_deg)) ?? NaN;
  const transmitMhz = one.f_tx_ghz === undefined ? null : one.f_tx_ghz * 1000;
  return {
    ...curve,
    boresightAzimuthDeg: one.az0_deg,
    boresightElevationDeg: one.el0_deg,
    rollDeg: 0,
    elementsX: one.nx,
    elementsY: one.ny,
    pitchXMm: one.pitch_mm,
    pitchYMm: one.pitch_mm,
    receiveTaper: taperOf({ taper: one.rx_taper, sll_db: one.rx_sll_db, nbar: one.rx_nbar }),
    transmitTaper: taperOf({ taper: one.tx_taper ?? 'uniform' }),
    normalLimitDb: limitDb,
    hardEndDb: limitDb,
    transmitBeamLimit: one.n_tx_beams ?? 0,
    sidelobeFloorDb: -40,
    receiveBandMhz: [(2 * one.f_rx_ghz - one.f_max_ghz) * 1000, one.f_max_ghz * 1000],
    transmitBandMhz: transmitMhz === null ? null : [transmitMhz - 1, transmitMhz + 1],
    radio: {
      radiationEfficiency: one.radiation_efficiency,
      antennaNoiseK: one.t_ant_k,
      feedLossDb: one.feed_loss_db,
      lnaNoiseFigureDb: one.lna_nf_db,
      lnaGainDb: one.lna_gain_db ?? NOISELESS_BACK_END.lnaGainDb,
      dividerWays: one.n_split ?? NOISELESS_BACK_END.dividerWays,
      dividerExcessDb: one.split_excess_db ?? NOISELESS_BACK_END.dividerExcessDb,
      secondNoiseFigureDb: one.second_nf_db ?? NOISELESS_BACK_END.secondNoiseFigureDb,
      wattsPerElement: one.w_per_element ?? 0,
      transmitLossDb: one.tx_loss_db ?? 0,
      outputBackOffDb: one.output_backoff_db ?? 0,
      otherLossDb: 0,
    },
  };
}

export const STATION: QuantityTable = {
  STA: (one: StationInputs) => {
    const face = faceOf(one);
    const figures = faceFigures(face, 5);
    const { receive, transmit, grating } = figures;
    return {
      elements: figures.elements,
      side_m: (one.nx * one.pitch_mm) / 1000,
      spacing_rx_wl: (grating.spacing * one.f_rx_ghz) / one.f_max_ghz,
      spacing_at_f_max_wl: grating.spacing,
      grating_limit_wl: grating.onsetSpacing,
      rx_gain_dbi: receive.gainDbi,
      t_sys_k: receive.systemNoiseK,
      gt_broadside_db_per_k: receive.gOverTDbK,
      hpbw_broadside_deg: receive.broadsideHpbw.uDeg,
      hpbw_at_theta_max_deg: receive.hpbwAtLimit.uDeg,
      scan_loss_at_theta_max_db: face.normalLimitDb,
      sky_fraction_above_5_deg: figures.skyCoverage,
      tx_gain_dbi: transmit?.gainDbi,
      tx_power_dbw: transmit && powerToDb(transmit.powerW),
      eirp_one_beam_dbw: transmit?.eirpOneBeamDbw,
      eirp_each_of_n_beams_dbw: transmit?.eirpEachBeamDbw,
      surface_density_w_m2: transmit?.surfaceWM2,
      public_limit_distance_one_beam_m: transmit?.exposureDistanceM,
    };
  },
};
