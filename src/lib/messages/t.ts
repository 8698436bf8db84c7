import { CATALOGUE, type Catalogue } from './catalogue.ts';
import { fillMessage } from './fill-message.ts';
import type { ValuesOf } from './message-values.ts';

export type MessageKey = keyof Catalogue;

/** Keys of messages that have no places. */
export type PlainKey = {
  [Key in MessageKey]: ValuesOf<Catalogue[Key]> extends [] ? Key : never;
}[MessageKey];

/**
 * The words for a key, with its places filled. English is the first language; another one is another catalogue with
 * the same keys.
 *
 * @example t('fleet.totals.pumps', { count: 412 }) // '412 pumps'
 */
export function t<Key extends MessageKey>(key: Key, ...[values]: ValuesOf<Catalogue[Key]>): string {
  return fillMessage(CATALOGUE[key], values);
}

/** Whether a name made at run time is a message's key. */
export const isPlainKey = (key: string): key is PlainKey => Object.hasOwn(CATALOGUE, key);
