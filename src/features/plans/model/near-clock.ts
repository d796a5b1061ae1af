import { DAY_MS, dayStart } from '../../../../shared/time.ts';
import { readClock } from '../../../lib/format-time.ts';

/** A time of day as the instant nearest to a known one, so that contacts across midnight are edited rightly. */
export function instantNear(text: string, knownMs: number): number | null {
  const start = dayStart(knownMs);
  const same = readClock(text, start);
  if (same === null) return null;
  const candidates = [same - DAY_MS, same, same + DAY_MS];
  return candidates.reduce((best, ms) =>
    Math.abs(ms - knownMs) < Math.abs(best - knownMs) ? ms : best,
  );
}
