import { CATALOGUE, type Catalogue } from './catalogue.ts';
import { fillMessage } from './fill-message.ts';
import type { ValuesOf } from './message-values.ts';

export type MessageKey = keyof Catalogue;

/**
 * The words for a key, with its places filled. English is the first language; another one is another catalogue with
 * the same keys.
 *
 * @example t('fleet.totals.pumps', { count: 412 }) // '412 pumps'
 */
export function t<Key extends MessageKey>(key: Key, ...[values]: ValuesOf<Catalogue[Key]>): string {
  return fillMessage(CATALOGUE[key], values);
}
