import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeCursor, encodeCursor, toPage } from '#server/http/page-cursor.ts';

const Keys = fc.tuple(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.string());

describe('a cursor', () => {
  it('comes back as the keys it was made of, to the last bit', () => {
    fc.assert(
      fc.property(Keys, (keys) => {
        // JSON has no negative zero; it sorts like zero.
        const expected = keys.map((key) => (Object.is(key, -0) ? 0 : key));
        expect(decodeCursor(encodeCursor(keys), ['number', 'string'])).toEqual(expected);
      }),
    );
  });

  it('is refused by name when it is of another list, cut short, or made up', () => {
    const cursor = encodeCursor([1, 'Pad 4']);
    for (const bad of [cursor.slice(1), cursor.slice(0, -4), 'x', encodeCursor(['Pad 4', 1]), encodeCursor([1])]) {
      expect(() => decodeCursor(bad, ['number', 'string'])).toThrow(/not valid/);
    }
  });

  it('is absent on the last page, and leads to exactly the rows that follow otherwise', () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.integer(), { maxLength: 40 }), fc.integer({ min: 1, max: 10 }), (values, limit) => {
        const sorted = values.toSorted((a, b) => a - b);
        const seen: number[] = [];
        let cursor: string | undefined;
        do {
          const [after] = decodeCursor(cursor, ['number']) ?? [Number.NEGATIVE_INFINITY];
          const rows = sorted.filter((value) => value > Number(after)).slice(0, limit + 1);
          const page = toPage(rows, limit, (value) => [value]);
          seen.push(...page.items);
          cursor = page.nextCursor ?? undefined;
        } while (cursor !== undefined);
        expect(seen).toEqual(sorted);
      }),
    );
  });
});
