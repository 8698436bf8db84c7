import { once } from 'node:events';
import type { Writable } from 'node:stream';

const CHUNK_LENGTH = 256 * 1024;

/** Writes texts in large pieces and waits while the reader is slower. Ends quietly when the reader has gone. */
export async function writeLines(output: Writable, texts: Iterable<string>): Promise<void> {
  let gone = false;
  output.once('error', () => {
    gone = true;
  });
  let chunk = '';
  for (const text of texts) {
    chunk += text;
    if (chunk.length < CHUNK_LENGTH) continue;
    if (gone) return;
    if (!output.write(chunk)) await Promise.race([once(output, 'drain'), once(output, 'close')]).catch(() => undefined);
    chunk = '';
  }
  if (!gone && chunk !== '') output.write(chunk);
}
