import type { PlanContext } from '../../../shared/schedule/context.ts';
import type { ContactModel, PassModel } from '../../../shared/schedule/model.ts';
import type { Demand, Maximum } from '../model/assignment.ts';
import type { CompiledDay } from './compile-day.ts';
import { makeStanding } from './standing.ts';

/** Levels before every mission's: changed missions first, then changed contacts. */
const CHANGED_MISSIONS = -2;
const CHANGED_CONTACTS = -1;

/** Contacts that stand in the plan as it is, and those that are broken: each of them breaks a rule, alone or with another. */
export function sortOutBroken(
  context: PlanContext,
  held: readonly ContactModel[],
  others: readonly ContactModel[],
): { whole: ContactModel[]; broken: ContactModel[] } {
  const standing = makeStanding(context);
  const base = [...context.day.neighbours, ...held];
  const whole: ContactModel[] = [];
  const broken: ContactModel[] = [];
  for (const contact of others) {
    const rest = others.filter((other) => other !== contact);
    (standing(contact, [...base, ...rest]) ? whole : broken).push(contact);
  }
  return { whole, broken };
}

/** Passes that a repair may touch: those of broken contacts, and others of the same missions as replacements. */
export function passesForRepair(
  context: PlanContext,
  broken: readonly ContactModel[],
): PassModel[] {
  const missions = new Set(broken.map(({ missionId }) => missionId));
  return context.day.passes.filter(({ missionId }) => missions.has(missionId));
}

const columnsWhere = (
  { options }: CompiledDay,
  holds: (option: CompiledDay['options'][number]) => boolean,
): number[] =>
  [...options.keys()].filter((index) => {
    const option = options[index];
    return option !== undefined && holds(option);
  });

/** Adds the goals of a repair: fewest changed missions, then fewest changed contacts, replacements only for what goes. */
export function withRepairGoals(
  compiled: CompiledDay,
  broken: readonly ContactModel[],
): CompiledDay {
  const demands: Demand[] = [];
  const maximums: Maximum[] = [];
  for (const missionId of new Set(broken.map((contact) => contact.missionId))) {
    const own = broken.filter((contact) => contact.missionId === missionId);
    const kept = columnsWhere(compiled, ({ keeps }) => keeps !== null && own.includes(keeps));
    demands.push({
      name: `mission ${missionId} unchanged`,
      level: CHANGED_MISSIONS,
      members: kept,
      amounts: kept.map(() => 1),
      least: own.length,
      pieces: [{ size: own.length, cost: 1 / own.length }],
      whole: true,
    });
    const served = columnsWhere(compiled, ({ pass }) => pass.missionId === missionId);
    maximums.push({
      name: `mission ${missionId} replaced`,
      members: served,
      amounts: served.map(() => 1),
      most: own.length,
    });
  }
  for (const contact of broken) {
    const kept = columnsWhere(compiled, ({ keeps }) => keeps === contact);
    demands.push({
      name: `contact ${contact.id} unchanged`,
      level: CHANGED_CONTACTS,
      members: kept,
      amounts: kept.map(() => 1),
      least: 1,
      pieces: [{ size: 1, cost: 1 }],
    });
  }
  const { assignment } = compiled;
  return {
    ...compiled,
    assignment: {
      ...assignment,
      demands: [...demands, ...assignment.demands],
      maximums: [...assignment.maximums, ...maximums],
    },
  };
}
