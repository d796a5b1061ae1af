import { infiniteQueryOptions } from '@tanstack/react-query';
import { AuditEventPage, MailPage } from '../../shared/schemas/audit-event.ts';
import { callApi } from '../lib/api-client.ts';

export interface AuditFilter {
  entity?: string | undefined;
  entityId?: string | undefined;
  action?: string | undefined;
}

// Widened, since later pages carry a cursor.
const FIRST = null as string | null;

export const auditQueries = {
  events: (filter: AuditFilter) =>
    infiniteQueryOptions({
      queryKey: ['audit-events', filter],
      queryFn: ({ signal, pageParam }) =>
        callApi('/api/audit-events', AuditEventPage, {
          query: { limit: 100, cursor: pageParam, ...filter },
          signal,
        }),
      initialPageParam: FIRST,
      getNextPageParam: (last) => last.nextCursor,
    }),
  mails: () =>
    infiniteQueryOptions({
      queryKey: ['mails'],
      queryFn: ({ signal, pageParam }) =>
        callApi('/api/mails', MailPage, { query: { limit: 100, cursor: pageParam }, signal }),
      initialPageParam: FIRST,
      getNextPageParam: (last) => last.nextCursor,
    }),
};
