import { useInfiniteQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { type AlarmFilter, alarmQueries } from './alarm-queries.ts';

/** Alarms of one class as far as they have been read. */
export function useAlarmList(filter: AlarmFilter) {
  const query = useInfiniteQuery(alarmQueries.list(filter));
  const alarms = useMemo(() => query.data?.pages.flatMap(({ items }) => items), [query.data]);
  return { query, alarms };
}
