import { useQuery } from '@tanstack/react-query';
import { useCallback, useSyncExternalStore } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Station } from '../../shared/schemas/station.ts';
import { remember, remembered } from '../lib/local-memory.ts';
import { stationQueries } from '../queries/station-queries.ts';

const listeners = new Set<() => void>();
const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

interface CurrentStation {
  station: Station | null;
  stations: Station[];
  isPending: boolean;
  error: Error | null;
  retry: () => void;
  choose: (id: string) => void;
}

/** The station at hand: named in the URL (`?station=`), else the remembered one, else the first. */
export function useStation(): CurrentStation {
  const query = useQuery(stationQueries.list());
  const [search, setSearch] = useSearchParams();
  const kept = useSyncExternalStore(subscribe, () => remembered('station'));
  const stations = query.data ?? [];
  const wanted = search.get('station') ?? kept;
  const station = stations.find(({ id }) => id === wanted) ?? stations[0] ?? null;
  const choose = useCallback(
    (id: string) => {
      remember('station', id);
      for (const listener of listeners) listener();
      setSearch((before) => {
        const after = new URLSearchParams(before);
        after.delete('station');
        return after;
      });
    },
    [setSearch],
  );
  return {
    station,
    stations,
    isPending: query.isPending,
    error: query.error,
    retry: () => void query.refetch(),
    choose,
  };
}
