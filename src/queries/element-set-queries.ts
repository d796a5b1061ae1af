import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  ElementSet,
  ElementSetPage,
  ElementSetUpload,
  ElementSetUploadPage,
} from '../../shared/schemas/element-set.ts';
import { callApi, callApiForAll, callApiForNothing } from '../lib/api-client.ts';
import { passQueries } from './pass-queries.ts';
import { satelliteQueries } from './satellite-queries.ts';

export interface ElementSetFilter {
  satelliteId?: string | undefined;
  state?: ElementSet['state'] | undefined;
}

export const elementSetQueries = {
  all: ['element-sets'] as const,
  list: (filter: ElementSetFilter) =>
    queryOptions({
      queryKey: [...elementSetQueries.all, 'list', filter],
      queryFn: ({ signal }) =>
        callApiForAll('/api/element-sets', ElementSetPage, { query: { ...filter }, signal }),
    }),
  uploads: () =>
    queryOptions({
      queryKey: [...elementSetQueries.all, 'uploads'],
      queryFn: async ({ signal }) =>
        (
          await callApi('/api/element-set-uploads', ElementSetUploadPage, {
            query: { limit: 20 },
            signal,
          })
        ).items,
    }),
  upload: (id: string) =>
    queryOptions({
      queryKey: [...elementSetQueries.all, 'uploads', id],
      queryFn: ({ signal }) =>
        callApi(`/api/element-set-uploads/${id}`, ElementSetUpload, { signal }),
    }),
};

const formOf = (file: File): FormData => {
  const form = new FormData();
  form.set('file', file, file.name);
  return form;
};

/** What the server would make of a file; nothing changes. */
export const usePreviewElementFile = () =>
  useMutation({
    mutationFn: (file: File) =>
      callApi('/api/element-set-uploads', ElementSetUpload, {
        method: 'POST',
        query: { dryRun: true },
        form: formOf(file),
      }),
  });

export function useAcceptElementFile() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (file: File) =>
      callApi('/api/element-set-uploads', ElementSetUpload, { method: 'POST', form: formOf(file) }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: elementSetQueries.all }),
        client.invalidateQueries({ queryKey: satelliteQueries.all }),
        client.invalidateQueries({ queryKey: passQueries.all }),
      ]),
  });
}

export function useWithdrawElementSet() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, reason }: { id: string; reason: string }) =>
      callApiForNothing(`/api/element-sets/${id}/withdraw`, { method: 'POST', body: { reason } }),
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: elementSetQueries.all }),
        client.invalidateQueries({ queryKey: satelliteQueries.all }),
        client.invalidateQueries({ queryKey: passQueries.all }),
      ]),
  });
}
