import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  Mission,
  MissionPage,
  type CreateMission,
  type PatchMission,
} from '../../shared/schemas/mission.ts';
import {
  Request,
  RequestPage,
  Requirement,
  RequirementPage,
  type CreateRequest,
  type CreateRequirement,
} from '../../shared/schemas/requirement.ts';
import { callApi, callApiForAll, callApiForNothing, tagOf } from '../lib/api-client.ts';

export const missionQueries = {
  all: ['missions'] as const,
  list: () =>
    queryOptions({
      queryKey: [...missionQueries.all, 'list'],
      queryFn: ({ signal }) => callApiForAll('/api/missions', MissionPage, { signal }),
      staleTime: 60_000,
    }),
  requirements: (missionId: string) =>
    queryOptions({
      queryKey: [...missionQueries.all, missionId, 'requirements'],
      queryFn: ({ signal }) =>
        callApiForAll('/api/requirements', RequirementPage, { query: { missionId }, signal }),
    }),
  requests: (missionId: string) =>
    queryOptions({
      queryKey: [...missionQueries.all, missionId, 'requests'],
      queryFn: ({ signal }) =>
        callApiForAll('/api/requests', RequestPage, { query: { missionId }, signal }),
    }),
};

/** Every change of a mission's own things; afterwards they are read again. */
function useMissionChange<Body, Answer>(change: (body: Body) => Promise<Answer>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () => client.invalidateQueries({ queryKey: missionQueries.all }),
  });
}

export const useCreateMission = () =>
  useMissionChange((body: CreateMission) =>
    callApi('/api/missions', Mission, { method: 'POST', body }),
  );
export const usePatchMission = () =>
  useMissionChange(({ mission, body }: { mission: Mission; body: PatchMission }) =>
    callApi(`/api/missions/${mission.id}`, Mission, {
      method: 'PATCH',
      body,
      ifMatch: tagOf(mission),
    }),
  );
export const useSaveRequirement = () =>
  useMissionChange(({ line, body }: { line: Requirement | null; body: CreateRequirement }) => {
    if (!line) return callApi('/api/requirements', Requirement, { method: 'POST', body });
    const { missionId: _mission, ...patch } = body;
    return callApi(`/api/requirements/${line.id}`, Requirement, {
      method: 'PATCH',
      body: patch,
      ifMatch: tagOf(line),
    });
  });
export const useDeleteRequirement = () =>
  useMissionChange((line: Requirement) =>
    callApiForNothing(`/api/requirements/${line.id}`, { method: 'DELETE', ifMatch: tagOf(line) }),
  );
export const useCreateRequest = () =>
  useMissionChange((body: CreateRequest) =>
    callApi('/api/requests', Request, { method: 'POST', body }),
  );
export const useWithdrawRequest = () =>
  useMissionChange((request: Request) =>
    callApi(`/api/requests/${request.id}`, Request, {
      method: 'PATCH',
      body: { state: 'withdrawn' },
      ifMatch: tagOf(request),
    }),
  );
