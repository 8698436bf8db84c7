import { fillMessage } from './fill-message.ts';
import type { Message, ValuesOf } from './message-values.ts';

/** Messages by key, each written once. */
export type Messages = Readonly<Record<string, Message>>;

/** Says a message of one catalogue, with its places filled: what is missing, or one too many, does not compile. */
export type Words<Catalogue extends Messages> = <Key extends keyof Catalogue & string>(
  key: Key,
  ...[values]: ValuesOf<Catalogue[Key]>
) => string;

/**
 * The words of a catalogue. A page that comes later brings its own beside those of every page, so that nobody loads
 * words before the page that says them.
 *
 * @example createWords({ 'wall.pumps': { one: '{count} pump', other: '{count} pumps' } })('wall.pumps', { count: 412 }) // '412 pumps'
 */
export const createWords =
  <const Catalogue extends Messages>(catalogue: Catalogue): Words<Catalogue> =>
  (key, ...[values]) =>
    fillMessage(catalogue[key] as Message, values);
