import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Mission } from '../../shared/schemas/mission.ts';
import { missionQueries } from '../queries/mission-queries.ts';

export interface MissionNames {
  list: Mission[];
  name: (id: string | null) => string;
  /** Place in the list of mission colours; null where the reader does not know the mission. */
  series: (id: string | null) => number | null;
  find: (id: string | null) => Mission | null;
}

/** Missions by id: names and colours, for every place that shows one. */
export function useMissions(): MissionNames {
  const { data } = useQuery(missionQueries.list());
  return useMemo(() => {
    const list = data ?? [];
    const byId = new Map(list.map((mission) => [mission.id, mission]));
    const find = (id: string | null): Mission | null => (id === null ? null : byId.get(id)) ?? null;
    return {
      list,
      find,
      name: (id) => find(id)?.name ?? 'Another mission',
      series: (id) => find(id)?.series ?? null,
    };
  }, [data]);
}
