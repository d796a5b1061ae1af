import type { Interval } from '../time.ts';
import type { ChannelModel, ClosureModel, DayModel } from './model.ts';

/** Closures that put a channel out of use (not those that only reduce it), with their instants. */
export function closuresOf(
  day: DayModel,
  channel: ChannelModel,
): (Interval & { closure: ClosureModel })[] {
  const scopes = new Set([
    `station|${day.station.id}`,
    `face|${channel.faceId}`,
    `channel|${channel.id}`,
  ]);
  return day.closures
    .filter(
      (closure) =>
        closure.reducedByDb === null &&
        scopes.has(`${closure.scope}|${closure.scopeId}`) &&
        (closure.direction === 'both' || closure.direction === channel.direction),
    )
    .map((closure) => ({ closure, fromMs: closure.fromMs, toMs: closure.toMs ?? Infinity }));
}
