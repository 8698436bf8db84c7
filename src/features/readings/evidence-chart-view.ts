import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import { HOUR_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { t } from '#src/lib/messages/page-words.ts';
import type { ReadingWindow } from './reading-queries.ts';

const STEP_MS = 5 * MINUTE_MS;

const BEFORE_MS = 10 * MINUTE_MS;
const SHORTEST_MS = 30 * MINUTE_MS;

/** From shortly before an alarm's beginning to three hours after, as far as there is time yet; in steps, so that it stands still. */
export function chartAround(from: number, now: number): ReadingWindow {
  const start = Math.floor((from - BEFORE_MS) / STEP_MS) * STEP_MS;
  const end = Math.ceil(Math.min(now, from + 3 * HOUR_MS) / STEP_MS) * STEP_MS;
  return { from: start, until: Math.max(end, start + SHORTEST_MS) };
}

/** Measured watts, with a dashed line where they usually are. */
export function wattsBeside({ t: times, watts, wattsMin, wattsMax }: ReadingSeries, usualWatts: number | undefined) {
  const measured = { label: t('pump.chart.watts'), values: watts, band: { low: wattsMin, high: wattsMax } };
  return {
    times,
    lines:
      usualWatts === undefined
        ? [measured]
        : [measured, { label: t('alarm.usualWatts'), values: times.map(() => usualWatts), dashed: true }],
  };
}
