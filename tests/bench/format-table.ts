import { type Figure, keepsLimit } from './bench.ts';

/** Figures as a table for a terminal: name, value, limit, and whether it is kept. */
export function formatTable(figures: readonly Figure[]): string {
  const rows = figures.map((figure) => [figure.name, formatValue(figure), formatLimit(figure), verdict(figure)]);
  const widths = [0, 1, 2, 3].map((column) => Math.max(...rows.map((row) => row[column]?.length ?? 0)));
  return rows
    .map((row) =>
      row
        .map((cell, column) => (column === 1 ? cell.padStart(widths[1] ?? 0) : cell.padEnd(widths[column] ?? 0)))
        .join('  '),
    )
    .join('\n');
}

const round = (value: number) => (Math.abs(value) >= 100 ? value.toFixed(0) : value.toFixed(2));
const formatValue = ({ value, unit }: Figure) => `${round(value)} ${unit}`.trim();

function formatLimit({ atLeast, atMost }: Figure): string {
  if (atLeast !== undefined) return `at least ${atLeast}`;
  return atMost === undefined ? 'informative' : `under ${atMost}`;
}

function verdict(figure: Figure): string {
  if (figure.atLeast === undefined && figure.atMost === undefined) return '';
  return keepsLimit(figure) ? 'ok' : 'MISSED';
}
