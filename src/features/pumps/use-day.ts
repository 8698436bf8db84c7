import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { localDay, localDayAt } from '#shared/domain/time/local-days.ts';
import { formatDayParam, parseDayParam } from '#src/lib/day-param.ts';

/** A calendar day of a zone as the page shows it. */
export type ShownDay = {
  readonly epochDay: number;
  readonly from: number;
  readonly until: number;
  readonly isToday: boolean;
};

/** The day the address names, else today, in a pad's zone. */
export function useDay(zone: string, now: number): ShownDay {
  const [search] = useSearchParams();
  const asked = parseDayParam(search.get('day'));
  const today = localDayAt(zone, now);
  const epochDay = Math.min(asked ?? today?.epochDay ?? 0, today?.epochDay ?? 0);
  return useMemo(() => {
    const day = localDay(zone, epochDay) ?? { from: 0, to: 1 };
    return { epochDay, from: day.from, until: day.to, isToday: epochDay === today?.epochDay };
  }, [zone, epochDay, today?.epochDay]);
}

/** The query that leads to a day; nothing for today. */
export const dayQuery = (epochDay: number | undefined): string =>
  epochDay === undefined ? '' : `?day=${formatDayParam(epochDay)}`;
