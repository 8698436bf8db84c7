import { formatQuantity } from '#shared/units/format-quantity.ts';
import type { Because } from './decision.ts';
import type { ExplainContext, ExplainOptions } from './explain-options.ts';
import { sayMinute, sayUntil } from './explain-time.ts';
import { fillMessage, type Message, messagesOf } from './fill-message.ts';
import { spokenEdge } from './spoken-edge.ts';

/** The words that fill a sentence. */
export type Words = Readonly<Record<string, string | undefined>>;

/** Everything that turns facts about one pump into words for one person. */
export type Teller = {
  readonly context: ExplainContext;
  readonly options: ExplainOptions;
  readonly message: Message;
};

/**
 * What sentences about a moment are made with.
 *
 * @example tellerOf(context, options).message('kind.none') // the sentence of the options' language
 */
export function tellerOf(context: ExplainContext, options: ExplainOptions): Teller {
  return { context, options, message: messagesOf(options.messages) };
}

export function saySpeed(rpm: number, { options }: Teller): string {
  return formatQuantity(rpm, 'speed', { system: options.system ?? 'us', locale: options.locale });
}

/**
 * What closes an input (`time clock 1`), and what it drives (`cleaner`), where that was recorded.
 *
 * @example sayInput(1, teller).closer // 'time clock 1'
 */
export function sayInput(input: number, { context, message }: Teller): { closer: string; duty: string | undefined } {
  const wired = context.inputs.find(({ number }) => number === input);
  const closer = fillMessage(message(`kind.${wired?.kind ?? 'none'}`), { input: String(input) });
  return { closer, duty: wired?.drives === undefined ? undefined : message(`duty.${wired.drives}`) };
}

/** Names a program entry by the part of the day that its middle lies in. */
function sayPart(fromMinute: number, toMinute: number, { message }: Teller): string {
  const length = toMinute > fromMinute ? toMinute - fromMinute : toMinute + 1440 - fromMinute;
  if (length >= 20 * 60) return message('part.all-day');
  const middle = (fromMinute + length / 2) % 1440;
  if (middle < 5 * 60 || middle >= 23 * 60) return message('part.night');
  if (middle < 11 * 60) return message('part.morning');
  return message(middle < 17 * 60 ? 'part.day' : 'part.evening');
}

function sayList(words: readonly string[], message: Message): string {
  const last = words.at(-1);
  if (last === undefined || words.length === 1) return last ?? '';
  return fillMessage(message('list.and'), { first: words.slice(0, -1).join(', '), last });
}

/** The words of a reason, and those modifiers of its key that they can fill. */
export function wordsOf(
  because: Because,
  until: number | undefined,
  at: number,
  teller: Teller,
): { words: Words; facets: string[] } {
  const { context, options, message } = teller;
  const moment = { zone: context.zone, hour12: options.hour12, message };
  const isByTheClock = because.kind === 'program' || because.kind === 'off';
  const spoken = until !== undefined && isByTheClock ? spokenEdge(until, context) : until;
  const untilWords = spoken === undefined ? undefined : sayUntil(spoken, at, moment);
  const words: Record<string, string | undefined> = { until: untilWords, ...reasonWords(because, teller) };
  const facets = [words.duty && 'drives', words.code && 'code', untilWords && 'until'];
  return { words, facets: facets.filter((facet): facet is string => facet !== undefined && facet !== '') };
}

function reasonWords(because: Because, teller: Teller): Words {
  const { message, options } = teller;
  switch (because.kind) {
    case 'input':
      return {
        input: String(because.input),
        others: sayList(because.others.map(String), message),
        ...sayInput(because.input, teller),
      };
    case 'program':
      return {
        entry: String(because.entry + 1),
        from: sayMinute(because.fromMinute, options.hour12, message),
        to: sayMinute(because.toMinute, options.hour12, message),
        part: sayPart(because.fromMinute, because.toMinute, teller),
      };
    case 'prime':
      return { next: message(`source.${because.next}`) };
    case 'fault':
      return { code: because.code };
    default:
      return {};
  }
}
