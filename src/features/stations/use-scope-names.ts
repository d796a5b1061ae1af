import { useQuery } from '@tanstack/react-query';
import type { Closure } from '../../../shared/schemas/channel.ts';
import type { Station } from '../../../shared/schemas/station.ts';
import { stationQueries } from '../../queries/station-queries.ts';

/** Names what a closure closes: the station, a face or a channel. */
export const useScopeNames = (
  station: Station,
): ((scope: Closure['scope'], id: string) => string) => {
  const faces = useQuery(stationQueries.faces(station.id));
  const channels = useQuery(stationQueries.channels(station.id));
  return (scope, id) => {
    if (scope === 'station') return 'Whole station';
    if (scope === 'face') return faces.data?.find((one) => one.id === id)?.label ?? 'A face';
    return channels.data?.find((one) => one.id === id)?.label ?? 'A channel';
  };
};
