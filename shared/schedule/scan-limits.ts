import { hardEndAngleRad } from '../array/hard-end.ts';
import { scanAngleForLoss } from '../array/scan-loss.ts';
import type { DayModel, Direction, FaceModel } from './model.ts';
import { bandOf } from './radio-fit.ts';

/**
 * Scan-loss limit of a mission's passes, dB: the limit of the day, or what its requirement lines at this station allow
 * where they are stricter or looser. With several lines the loosest counts here; each line is judged by its own.
 */
export function scanLossLimitDb(day: DayModel, missionId: string): number {
  const lines = day.requirements.filter(
    (line) =>
      line.missionId === missionId &&
      (line.stationId === null || line.stationId === day.station.id),
  );
  if (lines.length === 0) return day.limitOfDayDb;
  return Math.max(...lines.map((line) => line.scanLossLimitDb ?? day.limitOfDayDb));
}

/** Scan angle, rad, no beam of the face may pass in this direction: loss, table or grating lobe. */
export const hardEndRad = (face: FaceModel, direction: Direction): number =>
  hardEndAngleRad(face, bandOf(face, direction)?.[1] ?? null);

/** Largest scan angle, rad, within the limit and the hard end. */
export const largestScanRad = (face: FaceModel, direction: Direction, limitDb: number): number =>
  Math.min(scanAngleForLoss(face, limitDb), hardEndRad(face, direction));
