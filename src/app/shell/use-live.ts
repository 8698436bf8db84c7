import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { changeEndpoints } from '#shared/contract/http/changes.ts';
import { call } from '#src/lib/api/api-client.ts';
import { liveLink } from '#src/lib/live/live-link.ts';
import { applyNews } from '#src/lib/live/live-table.ts';
import { startLive } from '#src/lib/live/start-live.ts';
import { setServerNow } from '#src/lib/server-clock.ts';
import { LIVE_TABLES } from '../live-tables.ts';

const ASK_EVERY_MS = 30_000;

/** Keeps the live connection for as long as somebody is signed in, and writes its news into the query cache. */
export function useLive(): void {
  const client = useQueryClient();
  useEffect(() => {
    const reloadAll = () => void client.invalidateQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'session' });
    const reloadFailed = () => void client.invalidateQueries({ predicate: ({ state }) => state.status === 'error' });
    // Some networks let no socket through: then the page asks now and then.
    const timer = setInterval(() => {
      if (liveLink.get().phase !== 'live' && navigator.onLine) reloadAll();
    }, ASK_EVERY_MS);
    const stop = startLive({
      listChanges: (since) => call(changeEndpoints.list, { query: { since } }),
      apply: (news) => applyNews(client, LIVE_TABLES, news),
      reloadAll,
      reloadFailed,
      setServerNow,
    });
    return () => {
      clearInterval(timer);
      stop();
    };
  }, [client]);
}
