import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/t.ts';
import type { FleetView } from './fleet-address.ts';
import type { WallWindow } from './wall-window.ts';

/** What stretch of time the wall shows, as its heading. */
export function headingOf(
  { range }: FleetView,
  { live, from, until }: WallWindow,
  format: Format,
  zone: string,
): string {
  if (live) return range === '7d' ? t('fleet.heading.live7') : t('fleet.heading.live24');
  const last = format.day(until - 1, zone);
  return range === '7d'
    ? t('fleet.heading.days', { from: format.day(from, zone), to: last })
    : t('fleet.heading.day', { day: last });
}
