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
  /** On a phone each row is a small list of its own, every value behind its column's name. */
  readonly stacked?: boolean;
};

/** A row and a cell where a phone has no room for columns; the heads are for the ear alone there. */
const STACK = {
  table: 'max-sm:block max-sm:min-w-0',
  body: 'max-sm:block',
  row: 'max-sm:block max-sm:py-2 max-sm:first:border-0',
  cell: 'max-sm:flex max-sm:gap-3 max-sm:px-0 max-sm:py-0.5',
};

const isNothing = (value: ReactNode): boolean => value === undefined || value === null || value === '';

type StackedValueProps = { readonly head: string; readonly figures: boolean; readonly children: ReactNode };

/** A value behind its column's name, which the eye needs on a phone alone. */
function StackedValue({ head, figures, children }: StackedValueProps) {
  return (
    <>
      <span aria-hidden="true" className="w-20 shrink-0 text-13 text-ink-2 sm:hidden">
        {head}
      </span>
      <span className={figures ? 'figures' : undefined}>{children}</span>
    </>
  );
}

/** A plain table: hairlines, figures in their own type, scrolling sideways by itself where it is too wide. */
export function DataTable<Row>({ caption, columns, rows, keyOf, wide = false, stacked = false }: DataTableProps<Row>) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a part that scrolls must be reachable by keyboard.
    <section aria-label={caption} tabIndex={0} className="relative overflow-x-auto">
      <table
        className={classNames(
          'w-full border-collapse text-left',
          wide === 'very' ? 'min-w-5xl' : wide && 'min-w-xl',
          stacked && STACK.table,
        )}
      >
        <caption className="sr-only">{caption}</caption>
        <thead className={classNames('text-13 text-ink-2', stacked && 'max-sm:sr-only')}>
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
        <tbody className={stacked ? STACK.body : undefined}>
          {rows.map((row, index) => (
            <tr key={keyOf(row, index)} className={classNames('border-t border-rule', stacked && STACK.row)}>
              {columns.map(({ head, cell, figures, right }) => {
                const value = cell(row);
                return (
                  <td
                    key={head}
                    className={classNames(
                      'px-2 py-1.5 align-top first:pl-0 last:pr-0',
                      figures && (stacked ? 'whitespace-nowrap' : 'figures whitespace-nowrap'),
                      right && 'text-right',
                      stacked && (isNothing(value) ? 'max-sm:hidden' : STACK.cell),
                    )}
                  >
                    {stacked ? (
                      <StackedValue head={head} figures={figures === true}>
                        {value}
                      </StackedValue>
                    ) : (
                      value
                    )}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
