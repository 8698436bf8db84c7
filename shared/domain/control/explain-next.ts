import type { ExplainContext, ExplainOptions } from './explain-options.ts';
import { sayWhen } from './explain-time.ts';
import { saySpeed, tellerOf, wordsOf } from './explain-words.ts';
import { capitalise, fillMessage, firstKnownKey } from './fill-message.ts';
import type { PlannedRun } from './plan.ts';
import { spokenEdge } from './spoken-edge.ts';

/**
 * What a planned run will bring, in a sentence, seen from an instant (ms). A prime counts as the start it is.
 *
 * @example explainNext(nextRun, at, context, options) // 'Tomorrow at 10 AM time clock 1 starts the cleaner.'
 */
export function explainNext(run: PlannedRun, at: number, context: ExplainContext, options: ExplainOptions): string {
  const teller = tellerOf(context, options);
  const when = sayWhen(spokenEdge(run.from, context), at, {
    zone: context.zone,
    hour12: options.hour12,
    message: teller.message,
  });
  const { words, facets } = wordsOf(run.because, undefined, at, teller);
  const base = `next.${run.because.kind}`;
  const key = firstKnownKey([...facets.map((facet) => `${base}.${facet}`), base]) ?? 'next.prime';
  return capitalise(fillMessage(teller.message(key), { ...words, when, rpm: saySpeed(run.rpm, teller) }));
}
