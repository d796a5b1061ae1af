import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { Run } from '../../shared/schemas/run.ts';
import { callApi, callApiForNothing } from '../lib/api-client.ts';

const isOver = (run: Run | undefined): boolean =>
  run !== undefined && run.state !== 'queued' && run.state !== 'running';

export const runQueries = {
  /** Background work, read again every 400 ms until it is over. */
  one: (id: string) =>
    queryOptions({
      queryKey: ['runs', id],
      queryFn: ({ signal }) => callApi(`/api/runs/${id}`, Run, { signal }),
      refetchInterval: (query) => (isOver(query.state.data) ? false : 400),
      refetchIntervalInBackground: true,
    }),
};
export const runIsOver = isOver;

export function useCancelRun() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => callApiForNothing(`/api/runs/${id}/cancel`, { method: 'POST' }),
    onSettled: (_data, _error, id) => client.invalidateQueries({ queryKey: ['runs', id] }),
  });
}

/** Puts the result of a finished run on the plan after all; the plan's tag says which plan was seen. */
export function useApplyRun() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, ifMatch }: { id: string; ifMatch: string }) =>
      callApiForNothing(`/api/runs/${id}/apply`, { method: 'POST', ifMatch }),
    onSettled: (_data, _error, { id }) =>
      Promise.all([
        client.invalidateQueries({ queryKey: ['runs', id] }),
        client.invalidateQueries({ queryKey: ['plans'] }),
      ]),
  });
}
