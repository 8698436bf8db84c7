import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { alarmHealthEndpoints } from '#shared/contract/http/alarm-health.ts';
import { localTime } from '#shared/domain/time/local-time.ts';
import { call } from '#src/lib/api/api-client.ts';
import { formatDayParam } from '#src/lib/day-param.ts';
import type { HealthRange } from './health-address.ts';

export const healthQueries = {
  /** The figures of so many whole local days, and of today as far as it has come. */
  figures: (range: HealthRange, zone: string, now: number) => {
    const today = localTime(zone, now)?.epochDay ?? 0;
    const query = { from: formatDayParam(today - Number(range)), until: formatDayParam(today + 1) };
    return queryOptions({
      queryKey: ['alarm-health', query.from, query.until] as const,
      queryFn: ({ signal }) => call(alarmHealthEndpoints.read, { query, signal }),
      placeholderData: keepPreviousData,
    });
  },
};
