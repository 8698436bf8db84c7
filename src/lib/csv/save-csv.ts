import { type CsvValue, writeCsv } from './write-csv.ts';

const KEEP_MS = 60_000;

/** Hands a table to the browser as a file. The mark at its beginning tells spreadsheets that it is UTF-8. */
export function saveCsv(name: string, rows: readonly (readonly CsvValue[])[]): void {
  const url = URL.createObjectURL(new Blob([`\ufeff${writeCsv(rows)}`], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = `${name}.csv`;
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), KEEP_MS);
}
