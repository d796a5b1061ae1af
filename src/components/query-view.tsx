import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { ErrorState, Skeleton } from './states.tsx';

interface Props<T> {
  query: UseQueryResult<T>;
  /** The subject of "… could not be read". */
  what: string;
  who?: string;
  skeleton?: ReactNode;
  isEmpty?: (data: T) => boolean;
  empty?: ReactNode;
  children: (data: T) => ReactNode;
}

/** The states of what is read: loading, error, empty, data. Old data stays while new data loads. */
export function QueryView<T>({ query, what, who, skeleton, isEmpty, empty, children }: Props<T>) {
  if (query.data !== undefined) return <>{isEmpty?.(query.data) ? empty : children(query.data)}</>;
  if (query.isError)
    return (
      <ErrorState
        error={query.error}
        what={what}
        {...(who ? { who } : {})}
        onRetry={() => void query.refetch()}
      />
    );
  return <>{skeleton ?? <Skeleton />}</>;
}
