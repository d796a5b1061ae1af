import { QueryClientProvider } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { AnnouncerProvider } from '../components/announcer.tsx';
import { queryClient } from '../lib/query-client.ts';

export function Providers({ children }: { children: ReactNode }) {
  return (
    <QueryClientProvider client={queryClient}>
      <AnnouncerProvider>{children}</AnnouncerProvider>
    </QueryClientProvider>
  );
}
