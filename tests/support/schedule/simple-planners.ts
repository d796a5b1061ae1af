import type { PlanContext } from '../../../shared/schedule/context.ts';
import type { ContactModel, PassModel } from '../../../shared/schedule/model.ts';
import { planLegs } from '../../../shared/schedule/plan-legs.ts';
import { placeContact } from '../../../shared/schedule/reasons/placement.ts';
import { judgeRequirements } from '../../../shared/schedule/score/requirements.ts';
import { nearby } from '../../../shared/schedule/reasons/nearby.ts';

/** Some mission would get more than it wants. */
const tooMany = ({ day }: PlanContext, contacts: readonly ContactModel[]): boolean =>
  judgeRequirements(day, contacts).some(({ exceeded }) => exceeded);

/** Takes the passes in an order and gives each the longest contact that still fits: the plans that people make by hand. */
function placeInOrder(context: PlanContext, passes: readonly PassModel[]): ContactModel[] {
  const contacts: ContactModel[] = [];
  for (const pass of passes) {
    const near = nearby(context, contacts, pass);
    const placed = placeContact(near.context, {
      pass,
      legs: planLegs(near.context, near.contacts),
    });
    const contact = placed && { ...placed, id: `c-${pass.id}` };
    if (contact && !tooMany(context, [...contacts, contact])) contacts.push(contact);
  }
  return contacts;
}

export const firstComeFirstServed = (context: PlanContext): ContactModel[] =>
  placeInOrder(context, context.day.passes);

/** Highest mission first, longest pass first within it. */
export function byPriority(context: PlanContext): ContactModel[] {
  const priority = ({ missionId }: PassModel): number =>
    context.missions.get(missionId)?.priority ?? 5;
  const order = context.day.passes.toSorted(
    (a, b) => priority(a) - priority(b) || b.toMs - b.fromMs - (a.toMs - a.fromMs),
  );
  return placeInOrder(context, order);
}
