/**
 * The lines of a stream of UTF-8 text, one chunk's worth at a time: several times faster than a line a turn of the
 * event loop, and as flat in memory.
 */
export async function* readLines(stream: AsyncIterable<string | Buffer>): AsyncGenerator<string[]> {
  const decoder = new TextDecoder();
  let rest = '';
  for await (const chunk of stream) {
    const lines = (rest + (typeof chunk === 'string' ? chunk : decoder.decode(chunk, { stream: true }))).split('\n');
    rest = lines.pop() ?? '';
    yield lines;
  }
  rest += decoder.decode();
  if (rest !== '') yield [rest];
}
