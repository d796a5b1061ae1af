import { mayEver, seesMission } from '../shared/policy.ts';
import type { Person } from './deps.ts';

/**
 * The one filter for what a person may see. Operators, schedulers and administrators see everything on the
 * plan side; a lead sees own missions, and of others only which channels are taken when.
 */
export const visibleTo = (person: Person) => {
  const everything = mayEver(person, 'see.everything');
  return {
    everything,
    mission: (missionId: string | null): boolean => seesMission(person, missionId),
    /** A condition on a field that holds a mission, for queries. */
    where: (field: string): object =>
      everything ? {} : { [field]: { $in: [...person.leadsMissionIds] } },
  };
};
