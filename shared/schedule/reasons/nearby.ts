import { HOUR_MS, overlaps, type Interval } from '../../time.ts';
import type { PlanContext } from '../context.ts';
import { widen } from '../intervals.ts';
import type { ContactModel } from '../model.ts';
import { planLegs, type PlanLeg } from '../plan-legs.ts';
import { judgeContacts } from '../rules/judge-plan.ts';

/** Further away than this nothing touches a pass: set-up, tear-down and uncertainty are minutes. */
const REACH_MS = HOUR_MS;

/** The part of a plan around an interval: what can clash with something inside it. */
export interface Nearby {
  /** The same day with only the neighbours that are near. */
  context: PlanContext;
  contacts: ContactModel[];
  legs: PlanLeg[];
}

export function nearby(
  context: PlanContext,
  contacts: readonly ContactModel[],
  interval: Interval,
): Nearby {
  const around = widen(interval, REACH_MS);
  const isNear = ({ receive }: ContactModel): boolean => overlaps(receive, around);
  const own = contacts.filter(isNear);
  const day = { ...context.day, neighbours: context.day.neighbours.filter(isNear) };
  const near = { ...context, day };
  return { context: near, contacts: own, legs: planLegs(near, own) };
}

/** No rule is broken by these contacts together (with the neighbouring days'). */
export const holdsTogether = (context: PlanContext, contacts: readonly ContactModel[]): boolean =>
  judgeContacts(context, contacts).length === 0;
