import type { PlanContext } from '../../../shared/schedule/context.ts';
import { guardMs } from '../../../shared/schedule/holding.ts';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import { channelGroups } from './channel-groups.ts';
import { fixedPlan } from './fixed-plan.ts';
import { optionsKeeping } from './options.ts';

/** Whether a contact can stay exactly as it is, channels and all, beside others that stand. */
export function makeStanding(
  context: PlanContext,
): (contact: ContactModel, others: readonly ContactModel[]) => boolean {
  const everyChannel = new Set(context.day.channels.map(({ id }) => id));
  const groups = channelGroups(context.day, everyChannel);
  return (contact, others) => {
    const satellite = context.satellites.get(contact.satelliteId);
    if (!satellite) return false;
    const setting = { context, fixed: fixedPlan(context, others), groups };
    const guard = guardMs(context.day.station, satellite);
    return optionsKeeping(setting, contact, guard).some(({ sameChannels }) => sameChannels);
  };
}

export interface SetAside {
  contact: ContactModel;
  /** The locks (or neighbours) it cannot stand beside; empty: it cannot stand at all. */
  against: ContactModel[];
}

/** Locks that can all hold together, in order of mission priority and time, and those that cannot. */
export function vetLocks(
  context: PlanContext,
  locked: readonly ContactModel[],
): { held: ContactModel[]; setAside: SetAside[] } {
  const standing = makeStanding(context);
  const { neighbours } = context.day;
  const priority = ({ missionId }: ContactModel): number =>
    context.missions.get(missionId)?.priority ?? 5;
  const held: ContactModel[] = [];
  const setAside: SetAside[] = [];
  const order = locked.toSorted(
    (a, b) => priority(a) - priority(b) || a.receive.fromMs - b.receive.fromMs,
  );
  for (const contact of order) {
    if (standing(contact, [...neighbours, ...held])) held.push(contact);
    else
      setAside.push({
        contact,
        against: smallestClash(standing, contact, [...neighbours, ...held]),
      });
  }
  return { held, setAside };
}

/** A smallest set of the others that the contact cannot stand beside: each one is left out as long as the clash stays. */
function smallestClash(
  standing: ReturnType<typeof makeStanding>,
  contact: ContactModel,
  others: readonly ContactModel[],
): ContactModel[] {
  let clash = others.filter(
    ({ receive }) =>
      receive.fromMs < contact.receive.toMs + 36e5 && receive.toMs > contact.receive.fromMs - 36e5,
  );
  for (const one of clash) {
    const without = clash.filter((other) => other !== one);
    if (!standing(contact, without)) clash = without;
  }
  return clash;
}
