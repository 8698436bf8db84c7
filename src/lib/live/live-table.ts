import type { QueryClient } from '@tanstack/react-query';
import type { News } from './gather-news.ts';

/** What one feature does to the query cache for each kind of news. */
export type LiveTable = { readonly [Kind in keyof News]?: (client: QueryClient, items: News[Kind]) => void };

/** Passes news to every feature's table; a kind with nothing in it is not passed on. */
export function applyNews(client: QueryClient, tables: readonly LiveTable[], news: News): void {
  for (const table of tables) {
    if (news.pumps.length > 0) table.pumps?.(client, news.pumps);
    if (news.runs.length > 0) table.runs?.(client, news.runs);
    if (news.alarms.length > 0) table.alarms?.(client, news.alarms);
  }
}
