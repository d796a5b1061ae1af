import { queryOptions, useMutation } from '@tanstack/react-query';
import { Pass, PassPage, PassTrack } from '../../shared/schemas/pass.ts';
import { RunStarted } from '../../shared/schemas/run.ts';
import { callApi, callApiForAll } from '../lib/api-client.ts';

export interface PassFilter {
  stationId: string;
  fromUtc: string;
  toUtc: string;
  satelliteId?: string | undefined;
  missionId?: string | undefined;
  minElevationDeg?: number | undefined;
}

export const passQueries = {
  all: ['passes'] as const,
  list: (filter: PassFilter) =>
    queryOptions({
      queryKey: [...passQueries.all, 'list', filter],
      queryFn: ({ signal }) =>
        callApiForAll('/api/passes', PassPage, { query: { ...filter }, signal }),
      staleTime: 60_000,
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: [...passQueries.all, id],
      queryFn: ({ signal }) => callApi(`/api/passes/${id}`, Pass, { signal }),
    }),
  /** The knots only: the client evaluates them itself. */
  track: (id: string) =>
    queryOptions({
      queryKey: [...passQueries.all, id, 'track'],
      queryFn: async ({ signal }) =>
        (
          await callApi(`/api/passes/${id}/track`, PassTrack, {
            query: { stepSeconds: 600 },
            signal,
          })
        ).track,
      staleTime: 10 * 60_000,
      gcTime: 30 * 60_000,
    }),
  /** Points with loss and margin of every face, for the charts of one pass. */
  points: (id: string) =>
    queryOptions({
      queryKey: [...passQueries.all, id, 'points'],
      queryFn: async ({ signal }) =>
        (
          await callApi(`/api/passes/${id}/track`, PassTrack, {
            query: { stepSeconds: 10 },
            signal,
          })
        ).points,
      staleTime: 5 * 60_000,
    }),
};

export const useStartPrediction = () =>
  useMutation({
    mutationFn: (body: { stationId: string; fromUtc: string; toUtc: string }) =>
      callApi('/api/prediction-runs', RunStarted, { method: 'POST', body }),
  });
