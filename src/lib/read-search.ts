/**
 * A part of an address that must be one of a few words; undefined for anything else.
 *
 * @example readOneOf(['24h', '7d'], '7d') // '7d'
 */
export const readOneOf = <Value extends string>(values: readonly Value[], text: string | null): Value | undefined =>
  values.find((value) => value === text);

/** A free text of an address, trimmed and cut; undefined when nothing is left. */
export function readText(text: string | null, longest: number): string | undefined {
  const trimmed = text?.trim().slice(0, longest);
  return trimmed === undefined || trimmed === '' ? undefined : trimmed;
}

/**
 * An address with some parts changed; a part that is undefined, empty or what is `usual` anyway is left out, so that
 * links stay short.
 */
export function changeSearch(
  search: URLSearchParams,
  change: Readonly<Record<string, string | undefined>>,
  usual: Readonly<Record<string, string>>,
): URLSearchParams {
  const next = new URLSearchParams(search);
  for (const [name, value] of Object.entries(change)) {
    if (value === undefined || value === '' || usual[name] === value) next.delete(name);
    else next.set(name, value);
  }
  return next;
}
