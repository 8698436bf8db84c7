import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createColumnText } from '#server/ingest/array-literal.ts';
import { toStorableText } from '#server/ingest/storable-text.ts';
import { openTestPools } from '#tests/support/test-pools.ts';

const { machine } = await openTestPools();

/** What PostgreSQL reads of a column beside one of the given length. */
async function readBack(text: string, type: 'float8' | 'text', length: number): Promise<unknown[]> {
  const { rows } = await machine.query<{ value: unknown }>(
    `select value from unnest(array(select generate_series(1, $2::int)), $1::${type}[]) as u(place, value) order by place`,
    [text, length],
  );
  return rows.map(({ value }) => value ?? undefined);
}

describe('a column as PostgreSQL’s array text', () => {
  it('is read back by PostgreSQL as it was, gaps included', async () => {
    const numbers = fc.array(fc.option(fc.double({ noNaN: true, noDefaultInfinity: true }), { nil: undefined }), {
      maxLength: 30,
    });
    await fc.assert(
      fc.asyncProperty(numbers, async (values) => {
        const column = createColumnText();
        for (const value of values) column.addNumber(value);
        // A zero loses its sign on the way into text.
        expect(await readBack(column.toParameter(), 'float8', values.length)).toEqual(
          values.map((value) => (value === 0 ? 0 : value)),
        );
      }),
      { numRuns: 40 },
    );
  });

  it('keeps any text that may be stored: quotes, backslashes, commas, braces, other scripts', async () => {
    const texts = fc.array(fc.option(fc.string({ unit: 'binary' }), { nil: undefined }), { maxLength: 10 });
    await fc.assert(
      fc.asyncProperty(texts, async (values) => {
        const storable = values.map((value) => value && toStorableText(value, 100));
        const column = createColumnText();
        for (const value of storable) column.addText(value);
        expect(await readBack(column.toParameter(), 'text', storable.length)).toEqual(storable);
      }),
      { numRuns: 60 },
    );
  });
});
