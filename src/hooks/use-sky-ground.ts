import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { makeSkyGround, type SkyGround } from '../charts/sky-ground.ts';
import { stationQueries } from '../queries/station-queries.ts';

/** The sheet of a station's sky, once station and faces are known. `limitDb` null: each face's normal limit. */
export function useSkyGround(stationId: string | null, limitDb: number | null): SkyGround | null {
  const stations = useQuery(stationQueries.list());
  const faces = useQuery({ ...stationQueries.faces(stationId ?? ''), enabled: stationId !== null });
  const station = stations.data?.find(({ id }) => id === stationId);
  return useMemo(
    () => (station && faces.data ? makeSkyGround({ station, faces: faces.data, limitDb }) : null),
    [station, faces.data, limitDb],
  );
}
