import { toDegrees, toRadians } from '../units.ts';

/** How a face loses gain off boresight: the law -10 n log10(cos theta), or a measured table where there is one. */
export interface ScanLossCurve {
  scanLossExponent: number;
  /** Rows [scan angle deg, loss dB]: growing angles from 0, losses that do not fall. */
  scanLossTable: readonly (readonly [number, number])[] | null;
}

type Row = readonly [number, number];

function interpolate(x: number, [x0, y0]: Row, [x1, y1]: Row): number {
  return x1 === x0 ? y0 : y0 + ((x - x0) / (x1 - x0)) * (y1 - y0);
}

/** Rows between which `inside` changes from true to false; null when every row is inside. */
function lastPair(table: readonly Row[], inside: (row: Row) => boolean): [Row, Row] | null {
  const index = table.findIndex((row) => !inside(row));
  const before = table[index - 1];
  const after = table[index];
  return before && after ? [before, after] : null;
}

/**
 * Scan loss, positive dB. The law holds to about 60 deg (cos^n of the realised gain, Mailloux and Skolnik); a table is
 * interpolated linearly and never extrapolated. null: behind the face or beyond the table's last row.
 */
export function scanLossDb(curve: ScanLossCurve, scanAngleRad: number): number | null {
  if (scanAngleRad >= Math.PI / 2) return null;
  const table = curve.scanLossTable;
  if (table === null) return -10 * curve.scanLossExponent * Math.log10(Math.cos(scanAngleRad));
  const angleDeg = toDegrees(scanAngleRad);
  const last = table.at(-1);
  // A direction on the very last row must not be lost to the rounding of degrees.
  if (last && Math.abs(angleDeg - last[0]) < 1e-9) return last[1];
  const pair = lastPair(table, (row) => row[0] <= angleDeg);
  return pair && interpolate(angleDeg, pair[0], pair[1]);
}

/** Largest scan angle, rad, whose loss stays within the limit, never beyond the table's last row; 0 for a limit below 0. */
export function scanAngleForLoss(curve: ScanLossCurve, lossDb: number): number {
  const table = curve.scanLossTable;
  if (table === null) {
    if (lossDb <= 0) return 0;
    return Math.acos(10 ** (-lossDb / (10 * curve.scanLossExponent)));
  }
  const pair = lastPair(table, (row) => row[1] <= lossDb);
  const last = table.at(-1);
  if (pair) {
    const angleDeg = interpolate(lossDb, [pair[0][1], pair[0][0]], [pair[1][1], pair[1][0]]);
    return toRadians(angleDeg);
  }
  return last && last[1] <= lossDb ? toRadians(last[0]) : 0;
}
