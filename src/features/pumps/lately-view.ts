import type { Run, RunSourceName } from '#shared/contract/http/runs.ts';
import { formatSpan } from '#src/lib/format/format-span.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** Something worth telling a homeowner, when it began, in their words. */
export type LatelyEvent = { readonly at: number; readonly text: string };

/** How long a run of each kind must last to be worth telling, ms. A kind that is missing here is everyday life. */
const WORTH_MS: Partial<Record<RunSourceName, number>> = {
  'no-data': 30 * 60_000,
  keypad: 10 * 60_000,
  timed: 5 * 60_000,
  freeze: 30 * 60_000,
  stop: 10 * 60_000,
};

const WORDS: Partial<Record<RunSourceName, (span: string) => string>> = {
  'no-data': (span) => t('home.lately.noData', { span }),
  keypad: (span) => t('home.lately.manual', { span }),
  timed: (span) => t('home.lately.timed', { span }),
  freeze: (span) => t('home.lately.freeze', { span }),
  stop: (span) => t('home.lately.stop', { span }),
};

/** Runs that say the same and follow one another closely are one event. */
const JOIN_MS = 10 * 60_000;

function joinAlike(runs: readonly Run[], now: number): { source: RunSourceName; from: number; to: number }[] {
  const joined: { source: RunSourceName; from: number; to: number }[] = [];
  for (const { source, from, to } of runs) {
    const last = joined.findLast((each) => each.source === source);
    if (last !== undefined && from - last.to <= JOIN_MS) last.to = to ?? now;
    else joined.push({ source, from, to: to ?? now });
  }
  return joined;
}

/** The last start that primed well; what failed is an alarm's to tell. */
function lastStart(runs: readonly Run[]): LatelyEvent[] {
  const prime = runs.findLast(
    ({ source, to, flags }) => source === 'prime' && to !== null && !flags.includes('unprimed'),
  );
  if (prime === undefined || prime.to === null) return [];
  return [{ at: prime.from, text: t('home.lately.primed', { span: formatSpan(prime.to - prime.from) }) }];
}

/** What was out of the ordinary in a week of runs, the latest first. */
export function listLately(runs: readonly Run[], now: number): LatelyEvent[] {
  const told = joinAlike(runs, now).flatMap(({ source, from, to }): LatelyEvent[] => {
    const least = WORTH_MS[source];
    const words = WORDS[source];
    return least === undefined || words === undefined || to - from < least
      ? []
      : [{ at: from, text: words(formatSpan(to - from)) }];
  });
  return [...told, ...lastStart(runs)].sort((a, b) => b.at - a.at);
}
