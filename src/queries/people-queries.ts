import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { User, UserPage, type CreateUser, type PatchUser } from '../../shared/schemas/user.ts';
import { callApi, callApiForAll, tagOf } from '../lib/api-client.ts';

export const peopleQueries = {
  all: ['users'] as const,
  list: () =>
    queryOptions({
      queryKey: [...peopleQueries.all, 'list'],
      queryFn: ({ signal }) => callApiForAll('/api/users', UserPage, { signal }),
    }),
};

export function useSaveUser() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (change: { user: null; body: CreateUser } | { user: User; body: PatchUser }) =>
      change.user === null
        ? callApi('/api/users', User, { method: 'POST', body: change.body })
        : callApi(`/api/users/${change.user.id}`, User, {
            method: 'PATCH',
            body: change.body,
            ifMatch: tagOf(change.user),
          }),
    onSettled: () => client.invalidateQueries({ queryKey: peopleQueries.all }),
  });
}
