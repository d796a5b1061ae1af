import { DAY_MS } from '../../time.ts';
import type { MeanElements } from '../element-ranges.ts';
import { catalogText, checksum, exponentText } from './tle-columns.ts';

export interface FormElements extends MeanElements {
  catalogNumber: number;
  /** `2026-001A`, or anything else for unknown. */
  objectId: string;
  epochMs: number;
}

const EPOCH_STEPS_PER_DAY = 1e8;

/** `26123.45678901`: rounded to 0.864 ms first, so that the last instant of a year becomes the next. */
function epochText(epochMs: number): string {
  const roundedMs =
    (Math.round((epochMs / DAY_MS) * EPOCH_STEPS_PER_DAY) / EPOCH_STEPS_PER_DAY) * DAY_MS;
  const year = new Date(roundedMs + 0.1).getUTCFullYear();
  const day = (roundedMs - Date.UTC(year, 0, 1)) / DAY_MS + 1;
  return `${String(year % 100).padStart(2, '0')}${day.toFixed(8).padStart(12, '0')}`;
}

const angleText = (deg: number): string => {
  const text = (((deg % 360) + 360) % 360).toFixed(4);
  return (text === '360.0000' ? '0.0000' : text).padStart(8);
};

const designator = (objectId: string): string =>
  /^\d{4}-\d{3}[A-Z]{1,3}$/.test(objectId)
    ? `${objectId.slice(2, 4)}${objectId.slice(5)}`.padEnd(8)
    : ' '.repeat(8);

const signed = (line: string): string => line + String(checksum(line));

/**
 * The two-line form of elements that came in another file form; SGP4 is started from it. It keeps 1e-4 deg, 1e-8 rev/day
 * and 0.864 ms, which is all that sets published from two-line ones ever had; others move by less than 10 m (1.5 ms). A
 * number that the form cannot hold is written as 00000: the set's own `catalogNumber` is what identifies it.
 */
export function twoLineForm(set: FormElements): { line1: string; line2: string } {
  const number = catalogText(set.catalogNumber);
  const eccentricity = Math.min(9_999_999, Math.round(set.eccentricity * 1e7));
  const line1 = `1 ${number}U ${designator(set.objectId)} ${epochText(set.epochMs)}  .00000000  00000+0 ${exponentText(set.bstar)} 0    0`;
  const line2 = [
    `2 ${number}`,
    Math.min(180, set.inclinationDeg).toFixed(4).padStart(8),
    angleText(set.raanDeg),
    String(eccentricity).padStart(7, '0'),
    angleText(set.argumentOfPerigeeDeg),
    angleText(set.meanAnomalyDeg),
    `${set.meanMotionRevPerDay.toFixed(8).padStart(11)}    0`,
  ].join(' ');
  return { line1: signed(line1), line2: signed(line2) };
}
