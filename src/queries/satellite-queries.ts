import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  Satellite,
  SatellitePage,
  type CreateSatellite,
  type PatchSatellite,
} from '../../shared/schemas/satellite.ts';
import { callApi, callApiForAll, tagOf } from '../lib/api-client.ts';

export const satelliteQueries = {
  all: ['satellites'] as const,
  list: () =>
    queryOptions({
      queryKey: [...satelliteQueries.all, 'list'],
      queryFn: ({ signal }) => callApiForAll('/api/satellites', SatellitePage, { signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: [...satelliteQueries.all, id],
      queryFn: ({ signal }) => callApi(`/api/satellites/${id}`, Satellite, { signal }),
    }),
};

export function useCreateSatellite() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CreateSatellite) =>
      callApi('/api/satellites', Satellite, { method: 'POST', body }),
    onSuccess: () => client.invalidateQueries({ queryKey: satelliteQueries.all }),
  });
}

export function usePatchSatellite() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ satellite, body }: { satellite: Satellite; body: PatchSatellite }) =>
      callApi(`/api/satellites/${satellite.id}`, Satellite, {
        method: 'PATCH',
        body,
        ifMatch: tagOf(satellite),
      }),
    onSettled: () => client.invalidateQueries({ queryKey: satelliteQueries.all }),
  });
}
