export type CsvValue = string | number | null | undefined;

/** A spreadsheet reads a cell that begins so as a formula: a quote before it keeps it text. */
const FORMULA = /^[=+\-@\t\r]/;
const PLAIN_NUMBER = /^-?\d+(\.\d+)?$/;

function cellOf(value: CsvValue): string {
  if (value === null || value === undefined || (typeof value === 'number' && !Number.isFinite(value))) return '';
  const text = String(value);
  const safe = FORMULA.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/**
 * A table as comma-separated text (RFC 4180): lines end in CRLF, a cell with a comma, a quote or a line break is quoted,
 * nothing in it is taken for a formula. Numbers keep their point.
 *
 * @example writeCsv([['Pad', 'kWh'], ['Weir, house', 3.5]]) // 'Pad,kWh\r\n"Weir, house",3.5\r\n'
 */
export const writeCsv = (rows: readonly (readonly CsvValue[])[]): string =>
  rows.map((row) => `${row.map(cellOf).join(',')}\r\n`).join('');
