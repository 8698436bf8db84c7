import type { InfiniteData, QueryClient } from '@tanstack/react-query';
import type { Alarm, AlarmDetail, AlarmPage } from '#shared/contract/http/alarms.ts';
import { alarmQueries } from './alarm-queries.ts';

type AlarmPages = InfiniteData<AlarmPage, string | undefined>;

/** Pages with one alarm in its new state; the same object when none of them holds it. */
export function replaceInPages(data: AlarmPages, alarm: Alarm): AlarmPages {
  const holds = (page: AlarmPage) => page.items.some(({ id }) => id === alarm.id);
  if (!data.pages.some(holds)) return data;
  const replace = (page: AlarmPage) =>
    holds(page) ? { ...page, items: page.items.map((item) => (item.id === alarm.id ? alarm : item)) } : page;
  return { ...data, pages: data.pages.map(replace) };
}

/** Writes an alarm's new state wherever it is shown. An older version never overwrites a newer one. */
export function writeAlarm(client: QueryClient, alarm: Alarm): void {
  client.setQueriesData<AlarmPages>({ queryKey: alarmQueries.lists() }, (data) => data && replaceInPages(data, alarm));
  client.setQueryData<AlarmDetail>(alarmQueries.detail(alarm.id).queryKey, (detail) =>
    detail === undefined || detail.version > alarm.version ? detail : { ...detail, ...alarm },
  );
}
