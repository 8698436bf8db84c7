import { closeSync, existsSync, openSync, readSync, statSync } from 'node:fs';

/** No reader wants more than this on the terminal; the whole is in the file. */
const MOST_BYTES = 8_192;

/**
 * The last lines that were written to a log since a place in it, as text; '(nothing)' when there are none.
 *
 * @param {string | undefined} file
 * @param {number} [since] bytes
 * @param {number} [lines]
 */
export function lastWords(file, since = 0, lines = 12) {
  if (file === undefined || !existsSync(file)) return '(nothing)';
  const end = statSync(file).size;
  const start = Math.max(since, end - MOST_BYTES, 0);
  const bytes = Buffer.alloc(Math.max(end - start, 0));
  const handle = openSync(file, 'r');
  readSync(handle, bytes, 0, bytes.length, start);
  closeSync(handle);
  return bytes.toString('utf8').trimEnd().split('\n').slice(-lines).join('\n') || '(nothing)';
}
