import { arrayFactorDb } from '../../../shared/array/array-factor.ts';
import { halfPowerBeamwidthU } from '../../../shared/array/beamwidth.ts';
import { directionOf } from '../../../shared/array/direction.ts';
import { directionOnFace } from '../../../shared/array/face-geometry.ts';
import {
  isolationWithFloorDb,
  relativeGainDb,
  type FaceBeam,
} from '../../../shared/array/isolation.ts';
import { leastSeparationU } from '../../../shared/array/sidelobes.ts';
import { subArrayBeam } from '../../../shared/array/sub-array.ts';
import { withInterferenceDb } from '../../../shared/link/carrier.ts';
import {
  receiveCarrierToInterferenceDb,
  transmitCarrierToInterferenceDb,
} from '../../../shared/link/interference.ts';
import {
  gOverTDbK,
  noiseBehindLossK,
  systemNoiseK,
  type ReceiveChain,
} from '../../../shared/link/noise.ts';
import { plannedEirpDbw, sharedEirpDbw } from '../../../shared/link/transmit-power.ts';
import { powerToDb, toDegrees } from '../../../shared/units.ts';
import { angleBetween } from '../../../shared/vector.ts';
import { lineOf, patternOf } from './array.ts';
import { orientationOf, type FaceInputs } from './geometry.ts';
import { METRE_WAVE_MHZ, type QuantityTable, type TaperInputs } from './table.ts';
import { taperOf } from './taper-of.ts';

interface IsolationInputs extends TaperInputs, FaceInputs {
  nx: number;
  ny: number;
  dx_wl: number;
  dy_wl: number;
  element_n: number;
  beam_az_deg: number;
  beam_el_deg: number;
  other_az_deg: number;
  other_el_deg: number;
}
interface CarrierInputs extends TaperInputs {
  nx: number;
  d_wl: number;
  element_n: number;
  az0_deg: number;
  el0_deg: number;
  wanted_az_el_deg: [number, number];
  others: { az_deg: number; el_deg: number; rel_flux_db: number; rel_tx_power_db: number }[];
}
interface AnalogInputs {
  t_ant_k: number;
  feed_loss_db: number;
  lna_nf_db: number;
  lna_gain_db: number;
  second_nf_db: number;
  divider_excess_loss_db: number;
  n_beams: number;
}
const beamOf = (pattern: FaceBeam['pattern'], element_n: number): FaceBeam => ({
  pattern,
  floorDb: null,
  scanLossExponent: element_n,
  scanLossTable: null,
});
const chainOf = (one: AnalogInputs): ReceiveChain => ({
  feedLossDb: one.feed_loss_db,
  lnaNoiseFigureDb: one.lna_nf_db,
  lnaGainDb: one.lna_gain_db,
  dividerWays: one.n_beams,
  dividerExcessDb: one.divider_excess_loss_db,
  secondNoiseFigureDb: one.second_nf_db,
});

export const BEAMS: QuantityTable = {
  'MBM-EIRP': (one: {
    n_elements: number;
    w_per_element: number;
    output_backoff_db: number;
    gain_dbi: number;
    tx_loss_db: number;
    scan_loss_db: number;
    n_beams: number;
  }) => {
    const aperture = {
      elements: one.n_elements,
      wattsPerElement: one.w_per_element,
      gainDbi: one.gain_dbi - one.scan_loss_db,
      transmitLossDb: one.tx_loss_db,
    };
    const share = { beams: one.n_beams, backOffDb: one.output_backoff_db };
    return { eirp_dbw: plannedEirpDbw(aperture, share) };
  },
  'MBM-SHARE': ({ eirp_single_dbw, shares }: { eirp_single_dbw: number; shares: number[] }) => ({
    eirp_dbw: sharedEirpDbw(eirp_single_dbw, shares),
  }),
  'MBM-ANALOG': (one: AnalogInputs) => {
    const system = systemNoiseK(chainOf(one), one.t_ant_k);
    const alone = systemNoiseK(chainOf({ ...one, n_beams: 1 }), one.t_ant_k);
    return { t_sys_k: system, gt_loss_vs_one_beam_db: powerToDb(system / alone) };
  },
  'MBM-PRELNA': (one: {
    gain_dbi: number;
    loss_db: number;
    t_ant_k: number;
    t_phys_k: number;
    t_rx_k: number;
  }) => {
    const t_sys_k = noiseBehindLossK(one.t_ant_k, one.loss_db, one.t_phys_k) + one.t_rx_k;
    return { t_sys_k, gt_db_per_k: gOverTDbK(one.gain_dbi, one.loss_db, t_sys_k) };
  },
  'MBM-ISO': (one: IsolationInputs) => {
    const [to, other] = [
      directionOf(one.beam_az_deg, one.beam_el_deg),
      directionOf(one.other_az_deg, one.other_el_deg),
    ];
    const [steered, seen] = [to, other].map((s) => directionOnFace(orientationOf(one), s));
    if (!steered || !seen) return {};
    const pattern = patternOf(one);
    const [du, dv] = [seen.u - steered.u, seen.v - steered.v];
    return {
      separation_deg: toDegrees(angleBetween(to, other)),
      du,
      dv,
      array_factor_db: arrayFactorDb(pattern, du, dv),
      relative_gain_db: relativeGainDb(beamOf(pattern, one.element_n), steered, seen),
    };
  },
  'MBM-CI': (one: CarrierInputs) => {
    const plane = { ...one, ny: one.nx, dx_wl: one.d_wl, dy_wl: one.d_wl };
    const beam = beamOf(patternOf(plane), one.element_n);
    const on = (az: number, el: number) =>
      directionOnFace(orientationOf({ ...one, roll_deg: 0 }), directionOf(az, el));
    const wanted = on(...one.wanted_az_el_deg);
    const others = (key: 'rel_flux_db' | 'rel_tx_power_db') =>
      one.others.map((other) => ({
        at: on(other.az_deg, other.el_deg),
        relativeDb: other[key],
      }));
    return {
      receive_ci_db: receiveCarrierToInterferenceDb(beam, wanted, others('rel_flux_db')),
      transmit_ci_db: transmitCarrierToInterferenceDb(beam, wanted, others('rel_tx_power_db')),
    };
  },
  'MBM-FLOOR': (one: { array_factor_db: number; floor_db: number }) => ({
    isolation_db: isolationWithFloorDb(one.array_factor_db, one.floor_db),
  }),
  'MBM-CNI': ({ cn_db, ci_db }: { cn_db: number; ci_db: number }) => ({
    cn_i_db: withInterferenceDb(cn_db, ci_db),
  }),
  'MBM-SEP': (one: TaperInputs & { n: number; d_wl: number; isolation_db: number }) => {
    const least = leastSeparationU(lineOf(one), one.isolation_db);
    const axis = { elements: one.n, pitchMm: one.d_wl * 1000, taper: taperOf(one) };
    const hpbw_u = halfPowerBeamwidthU(axis, METRE_WAVE_MHZ);
    return {
      min_separation_u: least,
      hpbw_u,
      min_separation_in_hpbw: least === null ? null : least / hpbw_u,
    };
  },
  'MBM-SUB': ({ m, d_wl, du }: { m: number; d_wl: number; du: number }) => {
    const beam = subArrayBeam({ elements: m, pitch: d_wl }, du);
    return {
      subarray_loss_db: beam.lossDb,
      grating_lobe_at_du: beam.gratingLobeU,
      grating_lobe_rel_beam_db: beam.gratingLobeDb,
      half_power_half_width_u: beam.halfWidthU,
    };
  },
};
