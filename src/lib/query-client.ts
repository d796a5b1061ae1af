import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api-error.ts';

const worthAnotherTry = (failures: number, error: Error): boolean =>
  failures < 2 && error instanceof ApiError && (error.status === 0 || error.status >= 502);

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 15_000, retry: worthAnotherTry, refetchOnWindowFocus: true },
    mutations: { retry: false },
  },
});
