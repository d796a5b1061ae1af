import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { Session, type SignIn } from '../../shared/schemas/session.ts';
import { callApi, callApiForNothing } from '../lib/api-client.ts';
import { setServerTime } from '../lib/server-clock.ts';

export const sessionQueries = {
  current: () =>
    queryOptions({
      queryKey: ['session'],
      queryFn: async ({ signal }) => {
        const session = await callApi('/api/session', Session, { signal });
        setServerTime(session.serverTimeUtc);
        return session;
      },
      staleTime: 5 * 60_000,
    }),
};

export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SignIn) => callApi('/api/session', Session, { method: 'POST', body }),
    onSuccess: (session) => {
      client.clear();
      setServerTime(session.serverTimeUtc);
      client.setQueryData(sessionQueries.current().queryKey, session);
    },
  });
}

export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => callApiForNothing('/api/session', { method: 'DELETE' }),
    onSettled: async () => {
      await client.cancelQueries();
      client.clear();
      window.location.assign('/sign-in');
    },
  });
}
