import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  Channel,
  ChannelPage,
  Closure,
  ClosureHits,
  ClosurePage,
  type CreateClosure,
  type PatchChannel,
} from '../../shared/schemas/channel.ts';
import { Face, FacePage, type PatchFace } from '../../shared/schemas/face.ts';
import { Station, StationPage, type PatchStation } from '../../shared/schemas/station.ts';
import { callApi, callApiForAll, callApiForNothing, tagOf } from '../lib/api-client.ts';

export const stationQueries = {
  all: ['stations'] as const,
  list: () =>
    queryOptions({
      queryKey: [...stationQueries.all, 'list'],
      queryFn: ({ signal }) => callApiForAll('/api/stations', StationPage, { signal }),
      staleTime: 60_000,
    }),
  faces: (stationId: string) =>
    queryOptions({
      queryKey: [...stationQueries.all, stationId, 'faces'],
      queryFn: ({ signal }) =>
        callApiForAll('/api/faces', FacePage, { query: { stationId }, signal }),
      staleTime: 60_000,
    }),
  channels: (stationId: string) =>
    queryOptions({
      queryKey: [...stationQueries.all, stationId, 'channels'],
      queryFn: ({ signal }) =>
        callApiForAll('/api/channels', ChannelPage, { query: { stationId }, signal }),
      staleTime: 60_000,
    }),
  hits: (closureId: string) =>
    queryOptions({
      queryKey: [...stationQueries.all, 'closures', closureId, 'hits'],
      queryFn: async ({ signal }) =>
        (await callApi(`/api/closures/${closureId}/hits`, ClosureHits, { signal })).items,
    }),
  closures: (stationId: string) =>
    queryOptions({
      queryKey: [...stationQueries.all, stationId, 'closures'],
      queryFn: ({ signal }) =>
        callApiForAll('/api/closures', ClosurePage, { query: { stationId }, signal }),
    }),
};

function useStationChange<Body, Answer>(change: (body: Body) => Promise<Answer>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: stationQueries.all }),
        client.invalidateQueries({ queryKey: ['plans'] }),
      ]),
  });
}

export const usePatchStation = () =>
  useStationChange(({ station, body }: { station: Station; body: PatchStation }) =>
    callApi(`/api/stations/${station.id}`, Station, {
      method: 'PATCH',
      body,
      ifMatch: tagOf(station),
    }),
  );
export const usePatchFace = () =>
  useStationChange(({ face, body }: { face: Face; body: PatchFace }) =>
    callApi(`/api/faces/${face.id}`, Face, { method: 'PATCH', body, ifMatch: tagOf(face) }),
  );
export const usePatchChannel = () =>
  useStationChange(({ channel, body }: { channel: Channel; body: PatchChannel }) =>
    callApi(`/api/channels/${channel.id}`, Channel, {
      method: 'PATCH',
      body,
      ifMatch: tagOf(channel),
    }),
  );
export const useCreateClosure = () =>
  useStationChange((body: CreateClosure) =>
    callApi('/api/closures', Closure, { method: 'POST', body }),
  );
export const useEndClosure = () =>
  useStationChange((closure: Closure) =>
    callApiForNothing(`/api/closures/${closure.id}`, {
      method: 'DELETE',
      ifMatch: tagOf(closure),
    }),
  );
export const useSetInhibit = () =>
  useStationChange(({ stationId, reason }: { stationId: string; reason: string }) =>
    callApiForNothing(`/api/stations/${stationId}/transmit-inhibit`, {
      method: 'POST',
      body: { reason },
    }),
  );
export const useEndInhibit = () =>
  useStationChange((stationId: string) =>
    callApiForNothing(`/api/stations/${stationId}/transmit-inhibit`, { method: 'DELETE' }),
  );
