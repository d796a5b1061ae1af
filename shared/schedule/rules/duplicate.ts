import { intersect } from '../../time.ts';
import { satelliteName, type PlanContext } from '../context.ts';
import type { Violation } from '../model.ts';
import { groupBy, overlappingPairs, type PlanLeg } from '../plan-legs.ts';
import { clockSpan } from '../words.ts';

/** Contacts of one satellite do not overlap. */
export function judgeDuplicate(context: PlanContext, legs: readonly PlanLeg[]): Violation[] {
  const downlinks = legs.filter(({ direction }) => direction === 'receive');
  return groupBy(downlinks, ({ contact }) => contact.satelliteId)
    .flatMap((ofSatellite) => overlappingPairs(ofSatellite, ({ leg }) => leg))
    .flatMap(([first, second]) => {
      const during = intersect(first.leg, second.leg);
      if (!during) return [];
      const name = satelliteName(context, first.contact.satelliteId);
      return [
        {
          rule: 'duplicate' as const,
          message: `${name} has two contacts at once from ${clockSpan(during)}.`,
          contactIds: [first.contact.id, second.contact.id],
          ...during,
          value: 2,
          limit: 1,
          unit: 'contacts',
        },
      ];
    });
}
