/** What JSON.parse gives, before anyone looked at it. */
export type JsonObject = Readonly<Record<string, unknown>>;

// A string, or a bare word that C's printf writes for a number that is none.
const STRING_OR_BARE_NUMBER_WORD = /"(?:[^"\\]|\\.)*"|-?\b(?:nan|inf(?:inity)?)\b/gi;

function parse(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/**
 * Parses JSON; undefined when it is none. The bare words nan and inf, which are no JSON but which a device prints
 * when a sensor fails, are read as null, so that one bad number does not cost the good readings beside it.
 *
 * @example parseJsonText('{"w":nan}') // { w: null }
 */
export function parseJsonText(text: string): unknown {
  const value = parse(text);
  if (value !== undefined || !/nan|inf/i.test(text)) return value;
  return parse(text.replace(STRING_OR_BARE_NUMBER_WORD, (part) => (part.startsWith('"') ? part : 'null')));
}

/** Narrows to a JSON object: neither null nor an array. */
export function isJsonObject(value: unknown): value is JsonObject {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const CONTROL_CHARACTER = /[\u0000-\u001f\u007f]/;

/** A short text fit to store and show: 1 to `maxLength` characters and no control character, or undefined. */
export function shortText(value: unknown, maxLength: number): string | undefined {
  if (typeof value !== 'string' || value.length === 0 || value.length > maxLength) return undefined;
  return CONTROL_CHARACTER.test(value) ? undefined : value;
}
