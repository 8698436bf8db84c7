import { useInfiniteQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { type FleetFilter, fleetQueries } from './fleet-queries.ts';
import { orderNews } from './order-news.ts';
import { settleOrder } from './settle-order.ts';

/** With more pages than this the wall is not read again by itself: the person is asked. */
const PAGES_REREAD = 2;

const idOf = ({ pumpId }: PumpRow) => pumpId;

/**
 * The wall's rows as far as they have been read. Their order is the server's, but it stands still while `held` (a
 * pointer or the keyboard is in the wall); `moved` then says that there is a truer one, and `resort` takes it.
 */
export function useWallRows(filter: FleetFilter, held: boolean) {
  const client = useQueryClient();
  const query = useInfiniteQuery(fleetQueries.list(filter));
  const news = useStore(orderNews);
  const seen = useRef(news);
  const shown = useRef<readonly string[]>([]);
  const [unread, setUnread] = useState(false);
  const [sorted, setSorted] = useState(0);
  const pages = query.data?.pages;
  const reread = useCallback(() => {
    setUnread(false);
    shown.current = [];
    void client.resetQueries({ queryKey: fleetQueries.list(filter).queryKey });
  }, [client, filter]);

  useEffect(() => {
    if (seen.current === news) return;
    seen.current = news;
    if ((pages?.length ?? 0) > PAGES_REREAD) setUnread(true);
    else void client.invalidateQueries({ queryKey: fleetQueries.list(filter).queryKey });
  }, [news, pages, client, filter]);

  const rows = useMemo(() => pages?.flatMap(({ items }) => items) ?? [], [pages]);
  // biome-ignore lint/correctness/useExhaustiveDependencies: sorting again is asked for by counting up.
  const settled = useMemo(
    () => (held ? settleOrder(shown.current, rows, idOf) : { rows, moved: false }),
    [rows, held, sorted],
  );
  shown.current = settled.rows.map(idOf);
  const resort = () => {
    if (unread) reread();
    shown.current = rows.map(idOf);
    setSorted((count) => count + 1);
  };
  return { query, rows: settled.rows, moved: settled.moved || unread, resort, first: pages?.[0] };
}
