import { intersect, SECOND_MS } from '../../time.ts';
import { channelLabel, satelliteName, type PlanContext } from '../context.ts';
import type { Violation } from '../model.ts';
import { groupBy, overlappingPairs, type PlanLeg } from '../plan-legs.ts';
import { clock } from '../words.ts';

/** A channel serves one leg at a time, with set-up before and tear-down after; across midnight too. */
export function judgeChannelBusy(context: PlanContext, legs: readonly PlanLeg[]): Violation[] {
  return groupBy(legs, ({ leg }) => leg.channelId)
    .flatMap((onChannel) => overlappingPairs(onChannel, ({ held }) => held))
    .flatMap(([first, second]) => {
      const clash = intersect(first.held, second.held);
      return clash
        ? [violation(context, first, second, (clash.toMs - clash.fromMs) / SECOND_MS)]
        : [];
    });
}

function violation(
  context: PlanContext,
  first: PlanLeg,
  second: PlanLeg,
  seconds: number,
): Violation {
  const [one, other] = [first, second].map(({ contact }) =>
    satelliteName(context, contact.satelliteId),
  );
  const channel = channelLabel(context, first.leg.channelId);
  return {
    rule: 'channel-busy',
    message:
      `Channel ${channel} is held by ${one} until ${clock(first.held.toMs)}, ` +
      `but ${other} needs it from ${clock(second.held.fromMs)}, set-up and tear-down included.`,
    contactIds: [first.contact.id, second.contact.id],
    fromMs: Math.max(first.held.fromMs, second.held.fromMs),
    toMs: Math.min(first.held.toMs, second.held.toMs),
    value: seconds,
    limit: 0,
    unit: 's',
  };
}
