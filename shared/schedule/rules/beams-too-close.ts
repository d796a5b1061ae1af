import { intersect, type Interval } from '../../time.ts';
import { faceLabel, satelliteName, type PlanContext } from '../context.ts';
import { closenessWords } from '../conflict-words.ts';
import type { ConflictInterval, Violation } from '../model.ts';
import { directionWord, groupBy, overlappingPairs, type PlanLeg } from '../plan-legs.ts';
import { clockSpan } from '../words.ts';

function violation(
  context: PlanContext,
  pair: [PlanLeg, PlanLeg],
  conflict: ConflictInterval,
  during: Interval,
): Violation {
  const [one, other] = pair.map(({ contact }) => satelliteName(context, contact.satelliteId));
  const isolation = conflict.isolationDb !== null && conflict.requiredDb !== null;
  return {
    rule: 'beams-too-close',
    message:
      `The ${directionWord(conflict.direction)} beams of ${one} and ${other} on ${faceLabel(context, conflict.faceId)} ` +
      `come too close from ${clockSpan(during)}: ${closenessWords(conflict)}.`,
    contactIds: pair.map(({ contact }) => contact.id),
    ...during,
    value: isolation ? conflict.isolationDb : conflict.separationHpbw,
    limit: isolation ? conflict.requiredDb : conflict.requiredHpbw,
    unit: isolation ? 'dB' : 'HPBW',
  };
}

function judgePair(context: PlanContext, pair: [PlanLeg, PlanLeg]): Violation[] {
  const [a, b] = pair;
  const { passId, faceId } = a.contact;
  const common = intersect(a.leg, b.leg);
  if (!common || passId === b.contact.passId) return [];
  return context
    .conflictsOf(passId, faceId, a.direction)
    .filter(({ passIds }) => passIds.includes(b.contact.passId))
    .flatMap((conflict) => {
      const during = intersect(common, conflict);
      return during ? [violation(context, pair, conflict, during)] : [];
    });
}

/** Each beam of a face and direction keeps the C/I it needs against every other one, at each moment. */
export const judgeBeamsTooClose = (context: PlanContext, legs: readonly PlanLeg[]): Violation[] =>
  groupBy(legs, ({ contact, direction }) => `${contact.faceId}|${direction}`)
    .flatMap((together) => overlappingPairs(together, ({ leg }) => leg))
    .flatMap((pair) => judgePair(context, pair));
