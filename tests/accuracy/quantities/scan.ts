import { bestFace } from '../../../shared/array/best-face.ts';
import { reachableElevations, shellCoverage, skyCoverage } from '../../../shared/array/coverage.ts';
import { directionOf } from '../../../shared/array/direction.ts';
import { scanAngleForLoss, scanLossDb } from '../../../shared/array/scan-loss.ts';
import { toDegrees, toRadians } from '../../../shared/units.ts';
import type { QuantityTable } from './table.ts';

type Faces = [number, number][];
const boresights = (faces: Faces) =>
  faces.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg }));
const law = (n: number) => ({ scanLossExponent: n, scanLossTable: null });
const measured = (table: [number, number][]) => ({ scanLossExponent: 1, scanLossTable: table });

export const SCAN: QuantityTable = {
  'SCN-LOSS': ({ theta_deg, n }: { theta_deg: number; n: number }) => ({
    loss_db: scanLossDb(law(n), toRadians(theta_deg)),
  }),
  'SCN-MAX': ({ limit_db, n }: { limit_db: number; n: number }) => ({
    theta_max_deg: toDegrees(scanAngleForLoss(law(n), limit_db)),
  }),
  'SCN-TAB': ({ table, theta_deg }: { table: [number, number][]; theta_deg: number }) => ({
    loss_db: scanLossDb(measured(table), toRadians(theta_deg)),
  }),
  'SCN-TABMAX': ({ table, limit_db }: { table: [number, number][]; limit_db: number }) => ({
    theta_max_deg: toDegrees(scanAngleForLoss(measured(table), limit_db)),
  }),
  'SCN-COV': (one: { el0_deg: number; theta_max_deg: number; el_min_deg: number }) => ({
    fraction: skyCoverage(boresights([[0, one.el0_deg]]), one.theta_max_deg, one.el_min_deg),
  }),
  'SCN-LOW': (one: {
    az_deg: number;
    az0_deg: number;
    el0_deg: number;
    theta_max_deg: number;
    el_min_deg: number;
  }) => {
    const reach = reachableElevations(
      { azimuthDeg: one.az0_deg, elevationDeg: one.el0_deg },
      one.theta_max_deg,
      { azimuthDeg: one.az_deg, floorDeg: one.el_min_deg },
    );
    return { lowest_el_deg: reach?.[0] ?? null, highest_el_deg: reach?.[1] ?? null };
  },
  'SCN-MCOV': (one: { faces_az0_el0_deg: Faces; theta_max_deg: number; el_min_deg: number }) => ({
    fraction: skyCoverage(boresights(one.faces_az0_el0_deg), one.theta_max_deg, one.el_min_deg),
  }),
  'SCN-FACE': (one: {
    faces_az0_el0_deg: Faces;
    theta_max_deg: number;
    n: number;
    az_deg: number;
    el_deg: number;
  }) => {
    const faces = one.faces_az0_el0_deg.map(([az, el]) => ({
      boresightAzimuthDeg: az,
      boresightElevationDeg: el,
      rollDeg: 0,
    }));
    const best = bestFace(faces, directionOf(one.az_deg, one.el_deg), one.theta_max_deg);
    if (!best) return { face_index: null, theta_deg: null, loss_db: null };
    const loss_db = scanLossDb(law(one.n), best.scanAngleRad);
    return { face_index: best.index, theta_deg: toDegrees(best.scanAngleRad), loss_db };
  },
  'SCN-SHELL': (one: {
    faces_az0_el0_deg: Faces;
    theta_max_deg: number;
    el_min_deg: number;
    altitude_km: number;
  }) => ({
    fraction: shellCoverage(boresights(one.faces_az0_el0_deg), one.theta_max_deg, {
      floorDeg: one.el_min_deg,
      altitudeKm: one.altitude_km,
    }),
  }),
};
