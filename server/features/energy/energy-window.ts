import { dayText, epochDayOf, monthStart, nextMonth } from '#server/db/day-text.ts';
import type { EnergyQuery } from '#shared/contract/http/energy.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';

/** Local days, `until` not included, and the whole calendar months around them: prices go by months. */
export type EnergyWindow = {
  readonly from: string;
  readonly until: string;
  readonly monthsFrom: string;
  readonly monthsUntil: string;
};

const around = (from: string, until: string): EnergyWindow => ({
  from,
  until,
  monthsFrom: monthStart(epochDayOf(from)),
  monthsUntil: nextMonth(monthStart(epochDayOf(until) - 1)),
});

/** The window that was asked for, in a pad's zone; without one the present month up to and with today. */
export function windowOf(
  { from, until }: Pick<EnergyQuery, 'from' | 'until'>,
  zone: string,
  now: number,
): EnergyWindow {
  if (from !== undefined && until !== undefined) return around(from, until);
  const today = localDayAt(zone, now)?.epochDay ?? Math.floor(now / 86_400_000);
  return around(monthStart(today), dayText(today + 1));
}

/** The window of a local month; without one of the present month. */
export function monthWindow(month: string | undefined, zone: string, now: number): EnergyWindow {
  const today = localDayAt(zone, now)?.epochDay ?? Math.floor(now / 86_400_000);
  const first = month === undefined ? monthStart(today) : `${month}-01`;
  return around(first, nextMonth(first));
}
