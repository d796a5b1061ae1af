import { planContext, type PlanContext } from '../context.ts';
import type { ContactModel, DayModel, Facts, Violation } from '../model.ts';
import { planLegs } from '../plan-legs.ts';
import { judgeBeamsTooClose } from './beams-too-close.ts';
import { judgeChannelBusy } from './channel-busy.ts';
import { judgeChannelUnfit } from './channel-unfit.ts';
import { judgeClosure } from './closure.ts';
import { judgeDuplicate } from './duplicate.ts';
import { judgeHardEnd } from './hard-end.ts';
import { judgeOutsideWindow } from './outside-window.ts';
import { judgeTooShort } from './too-short.ts';
import { judgeTransmitLimit } from './transmit-limit.ts';

/** Every hard rule a plan breaks, in the order of time. Contacts of the neighbouring days count, but are not judged. */
export function judgeContacts(
  context: PlanContext,
  contacts: readonly ContactModel[],
): Violation[] {
  const legs = planLegs(context, contacts);
  return [
    ...judgeChannelBusy(context, legs),
    ...judgeOutsideWindow(context, legs),
    ...judgeChannelUnfit(context, legs),
    ...judgeBeamsTooClose(context, legs),
    ...judgeTransmitLimit(context, legs),
    ...judgeClosure(context, legs),
    ...judgeTooShort(context, contacts),
    ...judgeDuplicate(context, legs),
    ...judgeHardEnd(context, legs),
  ].sort((a, b) => a.fromMs - b.fromMs);
}

/** The same for a single plan; keep a `planContext` to judge many plans of one day. */
export const judgePlan = (plan: {
  day: DayModel;
  facts: Facts;
  contacts: readonly ContactModel[];
}): Violation[] => judgeContacts(planContext(plan.day, plan.facts), plan.contacts);
