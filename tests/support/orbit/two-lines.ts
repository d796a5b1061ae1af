/** Writes invented two-line sets for tests, with valid checksums. */
import { checksum } from '../../../shared/orbit/element-files/tle-columns.ts';

export interface InventedOrbit {
  catalogNumber: number;
  /** Two digits of the year and day of year. */
  epochYear: number;
  epochDay: number;
  bstar: string;
  inclinationDeg: number;
  raanDeg: number;
  eccentricity: number;
  argumentOfPerigeeDeg: number;
  meanAnomalyDeg: number;
  meanMotionRevPerDay: number;
}

const DEFAULT_ORBIT: InventedOrbit = {
  catalogNumber: 95101,
  epochYear: 26,
  epochDay: 335,
  bstar: ' 10000-4',
  inclinationDeg: 97.5,
  raanDeg: 40,
  eccentricity: 0.001,
  argumentOfPerigeeDeg: 30,
  meanAnomalyDeg: 10,
  meanMotionRevPerDay: 15.1,
};

const signed = (line: string): string => line + String(checksum(line));

export function twoLines(given: Partial<InventedOrbit> = {}): { line1: string; line2: string } {
  const orbit = { ...DEFAULT_ORBIT, ...given };
  const number = String(orbit.catalogNumber).padStart(5, '0');
  const angle = (deg: number): string => deg.toFixed(4).padStart(8);
  const epoch = `${String(orbit.epochYear).padStart(2, '0')}${orbit.epochDay.toFixed(8).padStart(12, '0')}`;
  const line1 = `1 ${number}U 26901A   ${epoch}  .00000000  00000+0 ${orbit.bstar} 0    1`;
  const line2 = [
    `2 ${number}`,
    angle(orbit.inclinationDeg),
    angle(orbit.raanDeg),
    orbit.eccentricity.toFixed(7).slice(2),
    angle(orbit.argumentOfPerigeeDeg),
    angle(orbit.meanAnomalyDeg),
    `${orbit.meanMotionRevPerDay.toFixed(8).padStart(11)}    1`,
  ].join(' ');
  return { line1: signed(line1), line2: signed(line2) };
}
