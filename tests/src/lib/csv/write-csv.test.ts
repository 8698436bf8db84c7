import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { writeCsv } from '#src/lib/csv/write-csv.ts';

/** A reader of RFC 4180 text, written from its grammar (section 2). */
function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let [row, cell, quoted]: [string[], string, boolean] = [[], '', false];
  for (let at = 0; at < text.length; at += 1) {
    const letter = text[at]!;
    if (quoted) {
      if (letter === '"' && text[at + 1] === '"') [cell, at] = [`${cell}"`, at + 1];
      else if (letter === '"') quoted = false;
      else cell += letter;
    } else if (letter === '"') quoted = true;
    else if (letter === ',') [row, cell] = [[...row, cell], ''];
    else if (letter === '\r' && text[at + 1] === '\n') {
      rows.push([...row, cell]);
      [row, cell, at] = [[], '', at + 1];
    } else cell += letter;
  }
  return rows;
}

describe('a table as CSV', () => {
  it('quotes commas, quotes and line breaks, and ends lines in CRLF (RFC 4180)', () => {
    expect(
      writeCsv([
        ['a', 'b,c'],
        ['d"e', 'f\ng'],
      ]),
    ).toBe('a,"b,c"\r\n"d""e","f\ng"\r\n');
  });

  it('keeps numbers as they are and leaves what is missing empty', () => {
    expect(writeCsv([[1.5, -2, '-3.25', null, undefined, Number.NaN]])).toBe('1.5,-2,-3.25,,,\r\n');
  });

  it('writes nothing that a spreadsheet takes for a formula', () => {
    for (const text of ['=1+1', '+1 555 555 0100', '-x', '@sum', '\tx'])
      expect(readCsv(writeCsv([[text]]))[0]![0]).toBe(`'${text}`);
  });

  it('reads back as it was', () => {
    const cell = fc.string().filter((text) => !/^[=+\-@\t\r]/.test(text));
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 1 }), { minLength: 1 }), (rows) => {
        expect(readCsv(writeCsv(rows))).toEqual(rows);
      }),
    );
  });
});
