import { arrayFactorDb } from '../../../shared/array/array-factor.ts';
import { halfPowerBeamwidthRad } from '../../../shared/array/beamwidth.ts';
import { apertureGainDbi } from '../../../shared/array/gain.ts';
import {
  gratingLobesDeg,
  lobeFreeSpacing,
  onsetSpacing,
} from '../../../shared/array/grating-lobes.ts';
import { sidelobesDb } from '../../../shared/array/sidelobes.ts';
import { taperEfficiency, taperWeights, taylorParameters } from '../../../shared/array/taper.ts';
import { powerToDb, toDegrees, toRadians } from '../../../shared/units.ts';
import { METRE_WAVE_MHZ, type QuantityTable, type TaperInputs } from './table.ts';
import { taperOf } from './taper-of.ts';

interface Line extends TaperInputs {
  n: number;
  d_wl: number;
}
interface Plane extends TaperInputs {
  nx: number;
  ny: number;
  dx_wl: number;
  dy_wl: number;
}
export const lineOf = (line: Line) => ({
  weights: taperWeights(taperOf(line), line.n),
  pitch: line.d_wl,
});
export const patternOf = (plane: Plane) => ({
  u: lineOf({ ...plane, n: plane.nx, d_wl: plane.dx_wl }),
  v: lineOf({ ...plane, n: plane.ny, d_wl: plane.dy_wl }),
});
const hpbwDeg = (line: Line, scanDeg: number): number | null => {
  const axis = { elements: line.n, pitchMm: line.d_wl * 1000, taper: taperOf(line) };
  const rad = halfPowerBeamwidthRad(axis, METRE_WAVE_MHZ, toRadians(scanDeg));
  return rad === null ? null : toDegrees(rad);
};

export const ARRAY: QuantityTable = {
  'ARR-GAIN': (one: Plane & { eta: number }) => ({
    gain_dbi: apertureGainDbi(
      { elementsX: one.nx, elementsY: one.ny, pitchX: one.dx_wl, pitchY: one.dy_wl },
      one.eta,
    ),
  }),
  'ARR-AF': (one: Plane & { u0: number; v0: number; u: number; v: number }) => ({
    af_db: arrayFactorDb(patternOf(one), one.u - one.u0, one.v - one.v0),
  }),
  'ARR-HPBW': (line: Line & { scan_deg: number }) => {
    const broadside = hpbwDeg(line, 0);
    return {
      hpbw_broadside_deg: broadside,
      hpbw_scanned_deg: hpbwDeg(line, line.scan_deg),
      hpbw_broadside_over_cos_deg: (broadside ?? NaN) / Math.cos(toRadians(line.scan_deg)),
    };
  },
  'ARR-SLL': (line: Line) => {
    const { firstDb, highestDb } = sidelobesDb(lineOf(line));
    return { first_sidelobe_db: firstDb, peak_sidelobe_db: highestDb };
  },
  'ARR-WGT': (line: Line) => ({ weights: taperWeights(taperOf(line), line.n) }),
  'ARR-TEFF': (line: Line) => {
    const efficiency = taperEfficiency(taperWeights(taperOf(line), line.n));
    const loss = -powerToDb(efficiency);
    return {
      efficiency_one_axis: efficiency,
      loss_one_axis_db: loss,
      loss_both_axes_db: 2 * loss,
    };
  },
  'ARR-TAYP': ({ sll_db, nbar }: { sll_db: number; nbar: number }) => {
    const { a, dilation, idealBeamwidth } = taylorParameters(sll_db, nbar);
    return {
      A: a,
      sigma: dilation,
      beta0_rad_times_wl_over_L: idealBeamwidth,
      hpbw_rad_times_wl_over_L: dilation * idealBeamwidth,
    };
  },
  'ARR-GLS': ({ theta_max_deg, n }: { theta_max_deg: number; n: number }) => ({
    onset_spacing_wl: onsetSpacing(theta_max_deg),
    whole_lobe_excluded_wl: lobeFreeSpacing(theta_max_deg, n),
  }),
  'ARR-GLD': ({ d_wl, theta0_deg }: { d_wl: number; theta0_deg: number }) => ({
    grating_lobe_deg: gratingLobesDeg(d_wl, theta0_deg),
  }),
};
