import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { RouteError } from './shell/route-error.tsx';

const Waiting = () => null;

const page = (path: string, lazy: NonNullable<RouteObject['lazy']>): RouteObject => ({
  path,
  lazy,
  errorElement: <RouteError />,
});

export const router = createBrowserRouter([
  {
    HydrateFallback: Waiting,
    errorElement: <RouteError />,
    children: [
      page('/sign-in', () => import('./routes/sign-in.tsx')),
      {
        lazy: async () => ({ Component: (await import('./shell/shell.tsx')).Shell }),
        errorElement: <RouteError />,
        children: [
          page('/', () => import('./routes/today.tsx')),
          page('/plans', () => import('./routes/plans.tsx')),
          page('/plans/:id', () => import('./routes/plan.tsx')),
          page('/plans/:id/sign-off', () => import('./routes/sign-off.tsx')),
          page('/passes', () => import('./routes/passes.tsx')),
          page('/element-sets', () => import('./routes/element-sets.tsx')),
          page('/element-sets/upload', () => import('./routes/element-set-upload.tsx')),
          page('/satellites', () => import('./routes/satellites.tsx')),
          page('/satellites/:id', () => import('./routes/satellite.tsx')),
          page('/missions', () => import('./routes/missions.tsx')),
          page('/missions/:id', () => import('./routes/mission.tsx')),
          page('/stations', () => import('./routes/stations.tsx')),
          page('/stations/:id', () => import('./routes/station.tsx')),
          page('/shift', () => import('./routes/shift.tsx')),
          page('/users', () => import('./routes/users.tsx')),
          page('/audit', () => import('./routes/audit.tsx')),
          page('/mails', () => import('./routes/mails.tsx')),
          page('*', () => import('./routes/not-found.tsx')),
        ],
      },
    ],
  },
]);
