import type { QueryClient } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect } from 'react-router-dom';
import type { Session } from '#shared/contract/http/session.ts';
import { alarmQueries } from '#src/features/alarms/alarm-queries.ts';
import { alarmListFilter, parseAlarmsAddress, workListFilter } from '#src/features/alarms/alarms-address.ts';
import { parseFleetAddress } from '#src/features/fleet/fleet-address.ts';
import { fleetQueries } from '#src/features/fleet/fleet-queries.ts';
import { pumpQueries } from '#src/features/pumps/pump-queries.ts';
import { sessionQuery } from '#src/features/session/session-queries.ts';
import { ApiError, isApiError } from '#src/lib/api/api-error.ts';
import { paths } from '#src/lib/paths.ts';
import { firstPage } from './shell/list-pages.ts';

/** What a page needs before it shows: somebody signed in, in a role the page is for. Its data is only begun here. */
export function createLoaders(client: QueryClient) {
  const requireSession = async (request: Request): Promise<Session> => {
    const { pathname, search } = new URL(request.url);
    try {
      return await client.ensureQueryData(sessionQuery());
    } catch (error) {
      if (isApiError(error, 'unauthenticated')) throw redirect(paths.signIn(pathname + search));
      throw error;
    }
  };
  const requireStaff = async (request: Request): Promise<void> => {
    const { user } = await requireSession(request);
    if (user.role === 'homeowner') throw new ApiError('forbidden', 'staff only');
  };

  const requireManager = async (request: Request): Promise<void> => {
    const { user } = await requireSession(request);
    if (user.role !== 'manager') throw new ApiError('forbidden', 'managers only');
  };

  return {
    managers: async ({ request }: LoaderFunctionArgs) => {
      await requireManager(request);
      return null;
    },
    settings: async ({ request }: LoaderFunctionArgs) => {
      await requireManager(request);
      return redirect(paths.rules());
    },
    session: async ({ request }: LoaderFunctionArgs) => {
      await requireSession(request);
      return null;
    },
    first: async ({ request }: LoaderFunctionArgs) => {
      const { user } = await requireSession(request);
      return redirect(firstPage(user.role));
    },
    fleet: async ({ request }: LoaderFunctionArgs) => {
      const { filter } = parseFleetAddress(new URL(request.url).searchParams);
      void client.prefetchInfiniteQuery(fleetQueries.list(filter));
      await requireStaff(request);
      return null;
    },
    pump: async ({ request, params }: LoaderFunctionArgs) => {
      void client.prefetchQuery(pumpQueries.detail(params.pumpId ?? ''));
      await requireSession(request);
      return null;
    },
    alarms: async ({ request }: LoaderFunctionArgs) => {
      const { filter } = parseAlarmsAddress(new URL(request.url).searchParams);
      void client.prefetchInfiniteQuery(alarmQueries.list(alarmListFilter(filter)));
      void client.prefetchInfiniteQuery(alarmQueries.list(workListFilter(filter)));
      await requireStaff(request);
      return null;
    },
    alarm: async ({ request, params }: LoaderFunctionArgs) => {
      void client.prefetchQuery(alarmQueries.detail(params.alarmId ?? ''));
      await requireStaff(request);
      return null;
    },
    myPump: async ({ request }: LoaderFunctionArgs) => {
      void client.prefetchQuery(pumpQueries.mine());
      await requireSession(request);
      return null;
    },
  };
}
