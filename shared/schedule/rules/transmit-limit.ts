import type { Interval } from '../../time.ts';
import { faceLabel, type PlanContext } from '../context.ts';
import type { Violation } from '../model.ts';
import { groupBy, type PlanLeg } from '../plan-legs.ts';
import { clockSpan } from '../words.ts';

interface Crowd extends Interval {
  legs: PlanLeg[];
}

/** Intervals in which more than `limit` of the legs are on at once, joined while they last, with all the legs involved. */
export function crowdedIntervals(legs: readonly PlanLeg[], limit: number): Crowd[] {
  const instants = [...new Set(legs.flatMap(({ leg }) => [leg.fromMs, leg.toMs]))].sort(
    (a, b) => a - b,
  );
  const crowds: Crowd[] = [];
  for (const [index, fromMs] of instants.entries()) {
    const toMs = instants[index + 1];
    if (toMs === undefined) break;
    const on = legs.filter(({ leg }) => leg.fromMs <= fromMs && leg.toMs > fromMs);
    if (on.length <= limit) continue;
    const last = crowds.at(-1);
    if (last && last.toMs === fromMs) {
      last.toMs = toMs;
      last.legs = [...new Set([...last.legs, ...on])];
    } else crowds.push({ fromMs, toMs, legs: on });
  }
  return crowds;
}

const peak = (crowd: Crowd): number =>
  Math.max(
    ...crowd.legs.map(
      ({ leg: { fromMs } }) =>
        crowd.legs.filter(({ leg }) => leg.fromMs <= fromMs && leg.toMs > fromMs).length,
    ),
  );

/** Simultaneous transmit legs of a face stay within its transmit-beam limit. */
export function judgeTransmitLimit(context: PlanContext, legs: readonly PlanLeg[]): Violation[] {
  const uplinks = legs.filter(({ direction }) => direction === 'transmit');
  return groupBy(uplinks, ({ contact }) => contact.faceId).flatMap((onFace) => {
    const face = context.faces.get(onFace[0]?.contact.faceId ?? '');
    if (!face) return [];
    return crowdedIntervals(onFace, face.transmitBeamLimit)
      .filter((crowd) => crowd.legs.some(({ own }) => own))
      .map((crowd) => ({
        rule: 'transmit-limit' as const,
        message: `${peak(crowd)} uplinks at once on ${faceLabel(context, face.id)} from ${clockSpan(crowd)}; ${face.transmitBeamLimit} are allowed.`,
        contactIds: crowd.legs.map(({ contact }) => contact.id),
        fromMs: crowd.fromMs,
        toMs: crowd.toMs,
        value: peak(crowd),
        limit: face.transmitBeamLimit,
        unit: 'beams',
      }));
  });
}
