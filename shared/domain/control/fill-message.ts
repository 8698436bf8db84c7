import { ENGLISH_MESSAGES, type MessageCatalogue, type MessageKey } from './explain-messages.data.ts';

/** Looks a message up in the catalogue chosen. */
export type Message = (key: MessageKey) => string;

export function messagesOf(catalogue: MessageCatalogue | undefined): Message {
  const messages = catalogue ?? ENGLISH_MESSAGES;
  return (key) => messages[key];
}

/**
 * A message with its `{names}` filled in; a name without a value becomes nothing.
 *
 * @example fillMessage('{closer} asks for {rpm}.', { closer: 'switch 3', rpm: '2,400 rpm' }) // 'switch 3 asks for 2,400 rpm.'
 */
export function fillMessage(message: string, values: Readonly<Record<string, string | undefined>>): string {
  return message.replace(/\{(\w+)\}/g, (_, name: string) => values[name] ?? '');
}

/** The first of some keys that the catalogue knows: the most telling sentence comes first. */
export function firstKnownKey(keys: readonly string[]): MessageKey | undefined {
  return keys.find((key): key is MessageKey => Object.hasOwn(ENGLISH_MESSAGES, key));
}

/**
 * A sentence with its first letter made a capital.
 *
 * @example capitalise('évening') // 'Évening'
 */
export function capitalise(sentence: string): string {
  const [first = '', ...rest] = sentence;
  return first.toUpperCase() + rest.join('');
}
