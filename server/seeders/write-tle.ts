import type { ReadElementSet } from '../../shared/orbit/element-reader.ts';
import { DAY_MS } from '../../shared/time.ts';
import { wrapDegrees } from '../../shared/units.ts';

type Elements = Pick<
  ReadElementSet,
  | 'line1'
  | 'line2'
  | 'epochMs'
  | 'meanMotionRevPerDay'
  | 'eccentricity'
  | 'inclinationDeg'
  | 'raanDeg'
  | 'argumentOfPerigeeDeg'
  | 'meanAnomalyDeg'
>;

const EARTH_RADIUS_KM = 6378.135;
const MU_KM3_S2 = 398_600.8;
/** Second zonal harmonic of WGS 72. */
const J2 = 1.082616e-3;

/** Sum of digits, a minus counts one, modulo ten. */
const checksum = (line: string): string => {
  let sum = 0;
  for (const character of line.slice(0, 68)) {
    if (character === '-') sum += 1;
    else if (character >= '0' && character <= '9') sum += Number(character);
  }
  return String(sum % 10);
};

const epochColumns = (epochMs: number): string => {
  const year = new Date(epochMs).getUTCFullYear();
  const day = (epochMs - Date.UTC(year, 0, 1)) / DAY_MS + 1;
  return String(year % 100).padStart(2, '0') + day.toFixed(8).padStart(12, '0');
};
const angle = (deg: number): string => (wrapDegrees(deg) % 360).toFixed(4).padStart(8);

/** Rates of node, perigee and mean anomaly under J2, degrees a day (first-order secular theory). */
const secularRates = (set: Elements) => {
  const n = (set.meanMotionRevPerDay * 2 * Math.PI) / 86_400;
  const a = (MU_KM3_S2 / n ** 2) ** (1 / 3);
  const p = a * (1 - set.eccentricity ** 2);
  const factor = 1.5 * J2 * (EARTH_RADIUS_KM / p) ** 2 * set.meanMotionRevPerDay * 360;
  const cosI = Math.cos((set.inclinationDeg * Math.PI) / 180);
  return {
    node: -factor * cosI,
    perigee: factor * (2 - 2.5 * (1 - cosI ** 2)),
    anomaly: set.meanMotionRevPerDay * 360,
  };
};

/** The same orbit with its epoch moved, node, perigee and mean anomaly carried along their secular rates. */
export const moveEpoch = (
  set: Elements,
  epochMs: number,
  { anomalyShiftDeg = 0 } = {},
): { line1: string; line2: string } => {
  const days = (epochMs - set.epochMs) / DAY_MS;
  const rates = secularRates(set);
  const bare1 = set.line1.slice(0, 18) + epochColumns(epochMs) + set.line1.slice(32, 68);
  const bare2 =
    set.line2.slice(0, 17) +
    angle(set.raanDeg + rates.node * days) +
    set.line2.slice(25, 34) +
    angle(set.argumentOfPerigeeDeg + rates.perigee * days) +
    ' ' +
    angle(set.meanAnomalyDeg + rates.anomaly * days + anomalyShiftDeg) +
    set.line2.slice(51, 68);
  return { line1: bare1 + checksum(bare1), line2: bare2 + checksum(bare2) };
};
