import { Readable, type Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

const CHUNK_LENGTH = 256 * 1024;

/** Writes texts in large pieces, no faster than they are taken, and leaves the output open. Ends quietly when nobody reads any more. */
export async function writeLines(output: Writable, texts: Iterable<string>): Promise<void> {
  try {
    await pipeline(Readable.from(gather(texts)), output, { end: false });
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'EPIPE')) throw error;
  }
}

function* gather(texts: Iterable<string>): Generator<string, void> {
  let chunk = '';
  for (const text of texts) {
    chunk += text;
    if (chunk.length < CHUNK_LENGTH) continue;
    yield chunk;
    chunk = '';
  }
  if (chunk !== '') yield chunk;
}
