import { roundInward, type Interval } from '../time.ts';
import { blockedIntervals, possibleIntervals } from './blocked.ts';
import { planContext, type PlanContext } from './context.ts';
import { subtract } from './intervals.ts';
import type { ContactModel, DayModel, Facts } from './model.ts';
import { planLegs } from './plan-legs.ts';

export interface AllowedQuestion {
  contacts: readonly ContactModel[];
  channelId: string;
  passId: string;
  /** The contact that is being moved: it does not stand in its own way. */
  ignoreContactId?: string;
}

/**
 * Intervals, whole seconds, in which a leg of the pass may lie on the channel beside the other contacts: any leg inside
 * one of them breaks no rule but perhaps `too-short` (and an uplink must lie inside its downlink). For the limits of a
 * drag; the server decides.
 */
export function allowedIntervalsIn(context: PlanContext, question: AllowedQuestion): Interval[] {
  const pass = context.passes.get(question.passId);
  const channel = context.channels.get(question.channelId);
  const satellite = pass && context.satellites.get(pass.satelliteId);
  if (!pass || !channel || !satellite) return [];
  const others = question.contacts.filter(({ id }) => id !== question.ignoreContactId);
  const legs = planLegs(context, others).filter(
    ({ contact }) => contact.id !== question.ignoreContactId,
  );
  const candidate = { pass, satellite, channel };
  const blocked = blockedIntervals(context, candidate, legs);
  return possibleIntervals(context, candidate, true).flatMap((possible) =>
    subtract(possible, blocked).flatMap((left) => roundInward(left) ?? []),
  );
}

/** The same from a day and its facts. */
export const allowedIntervals = (
  question: AllowedQuestion & { day: DayModel; facts: Facts },
): Interval[] => allowedIntervalsIn(planContext(question.day, question.facts), question);
