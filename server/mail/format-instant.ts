/**
 * An instant in the pad's own zone, with the zone said, as it stands in a mail.
 *
 * @example formatInstant(1752496920000, 'America/Phoenix') // 'Mon, Jul 14, 2025, 05:42 MST'
 */
export function formatInstant(at: number, zone: string): string {
  return new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    weekday: 'short',
    year: 'numeric',
    month: 'short',
    day: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
    timeZoneName: 'short',
  }).format(at);
}
