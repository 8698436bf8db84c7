import type { RunSourceName } from '#shared/contract/http/runs.ts';
import { sayInput, tellerOf } from '#shared/domain/control/explain-words.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { type MessageKey, t } from '#src/lib/messages/t.ts';
import { explainOptions, type WhyContext } from './why.ts';

type Labelled = { readonly source: RunSourceName; readonly activeInput: number };

/** A source that is missing here is too short for words, or says itself by being empty. */
const LABELS = {
  program: 'label.program',
  keypad: 'label.keypad',
  timed: 'label.timed',
  freeze: 'label.freeze',
  stop: 'label.stop',
  fault: 'label.fault',
  'no-data': 'label.no-data',
} as const satisfies Partial<Record<RunSourceName, MessageKey>>;

const isLabelled = (source: RunSourceName): source is keyof typeof LABELS => Object.hasOwn(LABELS, source);

/**
 * The words that may be written above a run on a large strip, the fullest first: what closes the input and what it
 * drives, what it drives, or the source's name. Empty where a run needs none.
 *
 * @example labelRun({ source: 'input', activeInput: 1 }, pump, format) // ['time clock 1: cleaner', 'cleaner']
 */
export function labelRun({ source, activeInput }: Labelled, context: WhyContext, format: Format): readonly string[] {
  if (source !== 'input') return isLabelled(source) ? [t(LABELS[source])] : [];
  const { closer, duty } = sayInput(activeInput, tellerOf(context, explainOptions(format, 'homeowner')));
  return duty === undefined ? [closer] : [`${closer}: ${duty}`, duty];
}
