import type { InfiniteData } from '@tanstack/react-query';
import type { FleetPage, PumpLive, PumpRow } from '#shared/contract/http/pumps.ts';
import type { LiveTable } from '#src/lib/live/live-table.ts';
import { readAgain, readUnderwayAgain } from '#src/lib/live/read-again.ts';
import { fleetQueries } from './fleet-queries.ts';
import { orderNews } from './order-news.ts';

export type FleetPages = InfiniteData<FleetPage, string | undefined>;

/** Pages with the latest word on their pumps. Rows keep their places; pages and rows without news stay the same objects. */
export function patchRows(data: FleetPages, news: ReadonlyMap<string, PumpLive>): FleetPages {
  const patchRow = (row: PumpRow): PumpRow => {
    const live = news.get(row.pumpId);
    return live === undefined ? row : { ...row, ...live };
  };
  const patchPage = (page: FleetPage): FleetPage =>
    page.items.some(({ pumpId }) => news.has(pumpId)) ? { ...page, items: page.items.map(patchRow) } : page;
  const pages = data.pages.map(patchPage);
  return pages.every((page, index) => page === data.pages[index]) ? data : { ...data, pages };
}

/** News of pumps changes their rows at once. News of alarms changes counts and, perhaps, the order: see use-wall-rows. */
export const fleetNews: LiveTable = {
  pumps: (client, pumps) => {
    const news = new Map(pumps.map((live) => [live.pumpId, live]));
    client.setQueriesData<FleetPages>({ queryKey: fleetQueries.lists() }, (data) => data && patchRows(data, news));
  },
  alarms: (client) => {
    readAgain(client, { queryKey: fleetQueries.totals({}).queryKey.slice(0, 2) });
    readUnderwayAgain(client, fleetQueries.lists());
    orderNews.set(orderNews.get() + 1);
  },
};
