import { localDayAt } from '#shared/domain/time/local-days.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { serverNow } from './server-clock.ts';

/** The day it is now in a zone, by the server's clock. @example localToday('America/Phoenix') // '2026-12-01' */
export function localToday(zone: string): string {
  const now = serverNow();
  const day = localDayAt(zone, now)?.epochDay ?? Math.floor(now / DAY_MS);
  return new Date(day * DAY_MS).toISOString().slice(0, 10);
}
