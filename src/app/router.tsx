import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter } from 'react-router-dom';
import { ErrorPage } from './error-page.tsx';
import { createLoaders } from './loaders.ts';
import { NotFoundPage } from './not-found-page.tsx';
import { PageSkeleton } from './page-skeleton.tsx';
import { Shell } from './shell/shell.tsx';

/** Every page of the client. A page's code and its first data are asked for at the same time. */
export function createRouter(client: QueryClient) {
  const load = createLoaders(client);
  return createBrowserRouter([
    {
      path: '/sign-in',
      lazy: { Component: async () => (await import('./routes/sign-in-page.tsx')).SignInPage },
      ErrorBoundary: ErrorPage,
      HydrateFallback: PageSkeleton,
    },
    {
      id: 'shell',
      loader: load.session,
      Component: Shell,
      ErrorBoundary: ErrorPage,
      HydrateFallback: PageSkeleton,
      shouldRevalidate: () => false,
      children: [
        {
          ErrorBoundary: ErrorPage,
          children: [
            { index: true, loader: load.first, Component: PageSkeleton },
            {
              path: 'fleet',
              loader: load.fleet,
              lazy: { Component: async () => (await import('./routes/fleet-page.tsx')).FleetPage },
            },
            {
              path: 'profile',
              lazy: { Component: async () => (await import('./routes/profile-page.tsx')).ProfilePage },
            },
            { path: '*', Component: NotFoundPage },
          ],
        },
      ],
    },
  ]);
}
