import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Navigate, Outlet, ScrollRestoration, useLocation } from 'react-router-dom';
import { ErrorState } from '../../components/states.tsx';
import { useLiveEvents } from '../../hooks/use-live-events.ts';
import { whenSessionLost } from '../../lib/api-client.ts';
import { sessionQueries } from '../../queries/session-queries.ts';
import { paths } from '../paths.ts';
import { Header } from './header.tsx';
import { InhibitBanner } from './inhibit-banner.tsx';

/** What stands around every page once somebody is signed in. */
export function Shell() {
  const session = useQuery(sessionQueries.current());
  const { pathname, search } = useLocation();
  const user = session.data?.user ?? null;
  const { refetch } = session;
  useEffect(() => whenSessionLost(() => void refetch()), [refetch]);
  useLiveEvents(user !== null);
  if (session.isPending) return <main id="main" aria-busy="true" aria-label="Loading" />;
  if (!session.data)
    return (
      <main id="main" className="flex-1 bg-surface">
        <h1 className="sr-only">Skysheaf</h1>
        <ErrorState error={session.error} what="Skysheaf" onRetry={() => void refetch()} />
      </main>
    );
  if (!user) {
    const from = pathname === '/' ? '' : `?from=${encodeURIComponent(pathname + search)}`;
    return <Navigate to={`${paths.signIn}${from}`} replace />;
  }
  return (
    <>
      <a
        href="#main"
        className="sr-only z-60 rounded-control bg-ink px-3 py-2 text-surface focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
      >
        Skip to the page
      </a>
      <Header user={user} />
      <InhibitBanner />
      <main id="main" tabIndex={-1} className="flex min-w-0 flex-1 flex-col">
        <Outlet />
      </main>
      <ScrollRestoration />
    </>
  );
}
