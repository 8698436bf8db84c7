import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter } from 'react-router-dom';
import { ErrorPage } from './error-page.tsx';
import { LAZY_PAGES } from './lazy-pages.ts';
import { createLoaders } from './loaders.ts';
import { NotFoundPage } from './not-found-page.tsx';
import { PageSkeleton } from './page-skeleton.tsx';
import { Shell } from './shell/shell.tsx';

/** Every page of the client. A page's code and its first data are asked for at the same time. */
export function createRouter(client: QueryClient) {
  const load = createLoaders(client);
  return createBrowserRouter([
    { path: '/sign-in', lazy: LAZY_PAGES.signIn, ErrorBoundary: ErrorPage, HydrateFallback: PageSkeleton },
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
            { path: 'fleet', loader: load.fleet, lazy: LAZY_PAGES.fleet },
            { path: 'pumps/:pumpId', loader: load.pump, lazy: LAZY_PAGES.pump },
            { path: 'alarms', loader: load.alarms, lazy: LAZY_PAGES.alarms },
            { path: 'alarms/health', loader: load.managers, lazy: LAZY_PAGES.alarmHealth },
            { path: 'alarms/:alarmId', loader: load.alarm, lazy: LAZY_PAGES.alarm },
            { path: 'energy', loader: load.managers, lazy: LAZY_PAGES.energy },
            { path: 'energy/pads/:padId', loader: load.managers, lazy: LAZY_PAGES.padEnergy },
            { path: 'settings', loader: load.settings, Component: PageSkeleton },
            { path: 'settings/rules', loader: load.managers, lazy: LAZY_PAGES.rules },
            { path: 'settings/tariffs', loader: load.managers, lazy: LAZY_PAGES.tariffs },
            { path: 'settings/tariffs/:tariffId', loader: load.managers, lazy: LAZY_PAGES.tariff },
            { path: 'my-pump', loader: load.myPump, lazy: LAZY_PAGES.myPump },
            { path: 'profile', lazy: LAZY_PAGES.profile },
            { path: '*', Component: NotFoundPage },
          ],
        },
      ],
    },
  ]);
}
