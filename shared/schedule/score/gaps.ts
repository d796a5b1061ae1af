import type { Interval } from '../../time.ts';

/** A stretch without contact. `open`: no contact is planned at that end, so it is counted to the edge of the day. */
export interface Gap extends Interval {
  openBefore: boolean;
  openAfter: boolean;
}

/**
 * Stretches without contact that touch the day: from the last contact before it to the first one after it, or to the
 * edges of the day where none is planned. Contacts may overlap (several satellites together).
 */
export function gapsOf(day: Interval, contacts: readonly Interval[]): Gap[] {
  const sorted = [...contacts].sort((a, b) => a.fromMs - b.fromMs);
  const before = sorted.filter(({ toMs }) => toMs <= day.fromMs);
  const during = sorted.filter(({ fromMs, toMs }) => toMs > day.fromMs && fromMs < day.toMs);
  const after = sorted.find(({ fromMs }) => fromMs >= day.toMs);
  const startMs = before.length > 0 ? Math.max(...before.map(({ toMs }) => toMs)) : null;
  const gaps: Gap[] = [];
  let cursorMs = startMs ?? day.fromMs;
  let openBefore = startMs === null;
  for (const { fromMs, toMs } of during) {
    if (fromMs > cursorMs)
      gaps.push({ fromMs: cursorMs, toMs: fromMs, openBefore, openAfter: false });
    if (toMs > cursorMs) [cursorMs, openBefore] = [toMs, false];
  }
  const endMs = after?.fromMs ?? day.toMs;
  if (endMs > cursorMs) gaps.push({ fromMs: cursorMs, toMs: endMs, openBefore, openAfter: !after });
  return gaps;
}

/** The longest of them, or null when contact never breaks off. */
export const longestGap = (gaps: readonly Gap[]): Gap | null =>
  gaps.reduce<Gap | null>(
    (longest, gap) =>
      longest === null || gap.toMs - gap.fromMs > longest.toMs - longest.fromMs ? gap : longest,
    null,
  );
