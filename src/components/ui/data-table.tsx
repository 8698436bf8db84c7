import type { ReactNode } from 'react';
import { classNames } from '#src/lib/class-names.ts';

export type Column<Row> = {
  readonly head: string;
  readonly cell: (row: Row) => ReactNode;
  readonly figures?: boolean;
  readonly right?: boolean;
};

export type DataTableProps<Row> = {
  readonly caption: string;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly keyOf: (row: Row, index: number) => string | number;
  /** Many columns: where there is no room it scrolls sideways rather than break words. */
  readonly wide?: boolean | 'very';
};

/** A plain table: hairlines, figures in their own type, scrolling sideways by itself where it is too wide. */
export function DataTable<Row>({ caption, columns, rows, keyOf, wide = false }: DataTableProps<Row>) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard.
    <section aria-label={caption} tabIndex={0} className="relative overflow-x-auto">
      <table
        className={classNames('w-full border-collapse text-left', wide === 'very' ? 'min-w-5xl' : wide && 'min-w-xl')}
      >
        <caption className="sr-only">{caption}</caption>
        <thead className="text-13 text-ink-2">
          <tr>
            {columns.map(({ head, right }) => (
              <th
                key={head}
                scope="col"
                className={classNames('px-2 py-1.5 font-medium first:pl-0 last:pr-0', right && 'text-right')}
              >
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <tr key={keyOf(row, index)} className="border-t border-rule">
              {columns.map(({ head, cell, figures, right }) => (
                <td
                  key={head}
                  className={classNames(
                    'px-2 py-1.5 align-top first:pl-0 last:pr-0',
                    figures && 'figures whitespace-nowrap',
                    right && 'text-right',
                  )}
                >
                  {cell(row)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
