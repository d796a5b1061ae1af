import { can, mayEver, type Action } from '../../../shared/policy.ts';
import { reader, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, forbidden } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { tellPlan } from './contact-store.ts';
import type { DayPlan } from './plan.entity.ts';
import { getPlan, lastRound } from './plan-read.service.ts';
import type { Round } from './sign-off.entity.ts';

/** 403 for the person, then 409 for the state. */
export const requireAction = (person: Person, action: Action, plan: DayPlan): void => {
  if (!mayEver(person, action)) throw forbidden('Your role does not allow this.');
  if (!can(person, action, { state: plan.state }))
    throw conflict('wrong-state', `A plan that is ${plan.state} does not allow this.`);
};

/** The tag is judged before any rule and before the state. */
export const requireTag = (plan: DayPlan, ifMatch: string): void =>
  checkTag(ifMatch, plan.id, plan.contentVersion, 'The plan');

export interface LifeWish {
  person: Person;
  planId: string;
  ifMatch: string;
}

/** Reads a plan for a step of its life: the person's right, then the tag, both before any rule. */
export const beginStep = async (
  deps: Deps,
  { person, planId, ifMatch }: LifeWish,
  action: Action,
): Promise<DayPlan> => {
  const plan = await getPlan(reader(deps), planId);
  if (!mayEver(person, action)) throw forbidden('Your role does not allow this.');
  requireTag(plan, ifMatch);
  requireAction(person, action, plan);
  return plan;
};

/** The step's plan inside the transaction: nobody may have changed it meanwhile. */
export const reread = async (work: Work, { planId, ifMatch }: LifeWish): Promise<DayPlan> => {
  const plan = await getPlan(work.em, planId);
  requireTag(plan, ifMatch);
  return plan;
};

export const moveTo = (work: Work, plan: DayPlan, state: DayPlan['state']): void => {
  plan.state = state;
  plan.contentVersion += 1;
  plan.updatedMs = work.nowMs;
  tellPlan(work, plan);
};

export const closeRound = async (
  work: Work,
  plan: DayPlan,
  outcome: NonNullable<Round['outcome']>,
): Promise<Round | null> => {
  const round = await lastRound(work.em, plan.id);
  if (round && round.closedMs == null) {
    round.closedMs = work.nowMs;
    round.outcome = outcome;
  }
  return round;
};
