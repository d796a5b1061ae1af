import type { Channel, Closure } from '../../shared/schemas/channel.ts';
import { DAY_MS, intersect, type Interval } from '../../shared/time.ts';

/** A part of a span in which a channel is out of service. */
export interface ClosedSpan extends Interval {
  id: string;
  reason: string;
  untilFurtherNotice: boolean;
}

const concerns = (closure: Closure, channel: Channel): boolean =>
  closure.scope === 'station' ||
  (closure.scope === 'face' && closure.scopeId === channel.faceId) ||
  (closure.scope === 'channel' && closure.scopeId === channel.id);

/** What closes a channel for its direction in a span; losses that merely reduce are not closures. */
export function closedSpans(
  channel: Channel,
  closures: readonly Closure[],
  span: Interval,
): ClosedSpan[] {
  return closures.flatMap((closure): ClosedSpan[] => {
    if (closure.reducedByDb !== null || !concerns(closure, channel)) return [];
    if (closure.direction !== 'both' && closure.direction !== channel.direction) return [];
    const end = closure.endedUtc ?? closure.toUtc;
    const common = intersect(span, {
      fromMs: Date.parse(closure.fromUtc),
      toMs: end === null ? span.toMs + DAY_MS : Date.parse(end),
    });
    return common
      ? [{ ...common, id: closure.id, reason: closure.reason, untilFurtherNotice: end === null }]
      : [];
  });
}
