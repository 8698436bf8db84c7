import { CATALOGUE, type Catalogue } from './catalogue.ts';
import { createWords } from './create-words.ts';

export type MessageKey = keyof Catalogue;

/**
 * The words for a key, with its places filled. English is the first language; another one is another catalogue with
 * the same keys.
 *
 * @example t('fleet.totals.pumps', { count: 412 }) // '412 pumps'
 */
export const t = createWords(CATALOGUE);
