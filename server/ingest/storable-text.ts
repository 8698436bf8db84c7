// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const CONTROL_CHARACTERS = /[\u0000-\u001f\u007f]+/g;

/**
 * Makes any text one that PostgreSQL stores and a screen shows: no control characters (it takes no NUL at all), no half
 * of a surrogate pair, at most `maxLength` characters.
 *
 * @example toStorableText('a\u0000b', 10) // 'a b'
 */
export function toStorableText(text: string, maxLength: number): string {
  return Buffer.from(text.slice(0, maxLength).replace(CONTROL_CHARACTERS, ' ')).toString();
}
