import type { Message } from './message-values.ts';

const rules = new Intl.PluralRules('en');
const figures = new Intl.NumberFormat('en');

/**
 * Fills a message's places; numbers get their thousands separators.
 *
 * @example fillMessage({ one: '{count} pump', other: '{count} pumps' }, { count: 1200 }) // '1,200 pumps'
 */
export function fillMessage(message: Message, values: Readonly<Record<string, string | number>> = {}): string {
  const count = values.count;
  const text =
    typeof message === 'string'
      ? message
      : typeof count === 'number' && rules.select(count) === 'one'
        ? message.one
        : message.other;
  return text.replaceAll(/\{(\w+)\}/g, (place, name: string) => {
    const value = values[name];
    if (value === undefined) return place;
    return typeof value === 'number' ? figures.format(value) : value;
  });
}
