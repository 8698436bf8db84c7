const formats = new Map<string, Intl.DateTimeFormat>();

/** What the platform's own calendar says a wall clock shows: an oracle that shares nothing with the code under test. */
export function platformWallTime(zone: string, at: number): { date: string; time: string; weekday: string } {
  let format = formats.get(zone);
  if (format === undefined) {
    format = new Intl.DateTimeFormat('en-CA', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: '2-digit',
      day: '2-digit',
      hour: '2-digit',
      minute: '2-digit',
      second: '2-digit',
      weekday: 'long',
    });
    formats.set(zone, format);
  }
  const parts = Object.fromEntries(format.formatToParts(at).map(({ type, value }) => [type, value]));
  return {
    date: `${parts.year}-${parts.month}-${parts.day}`,
    time: `${parts.hour}:${parts.minute}:${parts.second}`,
    weekday: parts.weekday ?? '',
  };
}

/** Calendar days from 1970-01-01 to a date written YYYY-MM-DD. */
export function epochDayOf(date: string): number {
  return Date.parse(`${date}T00:00:00Z`) / 86_400_000;
}

/** Zones that between them hold every oddity: no daylight saving, half hours, midnight shifts, Ramadan, both hemispheres. */
export const TRYING_ZONES = [
  'UTC',
  'Europe/Berlin',
  'Europe/London',
  'America/New_York',
  'America/Los_Angeles',
  'America/Phoenix',
  'America/St_Johns',
  'America/Santiago',
  'America/Havana',
  'Australia/Sydney',
  'Australia/Lord_Howe',
  'Australia/Adelaide',
  'Pacific/Auckland',
  'Pacific/Chatham',
  'Africa/Casablanca',
  'Asia/Kathmandu',
  'Asia/Tehran',
] as const;
