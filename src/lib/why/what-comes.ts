import { explainNext } from '#shared/domain/control/explain-next.ts';
import { type PlannedRun, plan } from '#shared/domain/control/plan.ts';
import { recordedWindows } from '#shared/domain/control/window-spans.ts';
import { HOUR_MS } from '#shared/domain/time/local-time.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { explainOptions, type WhyContext } from './why.ts';

const AHEAD_MS = 36 * HOUR_MS;

/**
 * The planned run worth telling a homeowner: the next time a clock or another input takes over, else the next start.
 * A program that hands over to its next entry is no news.
 */
function findNews(runs: readonly PlannedRun[], now: number): PlannedRun | undefined {
  const ahead = runs.filter(({ from }) => from > now);
  const starts = ahead.filter(
    ({ from, rpm }) => rpm > 0 && runs.some((before) => before.to === from && before.rpm === 0),
  );
  return ahead.find(({ source }) => source === 'input') ?? starts[0];
}

/**
 * What a pump's program and clocks bring next, as a homeowner's sentence; undefined when nothing does within a day and
 * a half.
 *
 * @example whatComes(pump, now, format) // 'Tomorrow at 10 AM time clock 1 starts the cleaner.'
 */
export function whatComes(context: WhyContext, now: number, format: Format): string | undefined {
  const { settings, traits, zone, inputs } = context;
  const runs = plan(
    settings,
    traits,
    { zone, motorClockOffsetMinutes: 0 },
    now,
    now + AHEAD_MS,
    recordedWindows(inputs),
  );
  const news = findNews(runs, now);
  return news === undefined ? undefined : explainNext(news, now, context, explainOptions(format, 'homeowner'));
}
