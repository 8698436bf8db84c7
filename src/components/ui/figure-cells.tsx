import type { ReactNode } from 'react';
import { classNames } from '#src/lib/class-names.ts';
import { Figures } from './figures.tsx';

export type FigureCell = {
  readonly name: string;
  /** Large; its words stand in the words' type. */
  readonly figure: string;
  /** Small, right behind it. */
  readonly beside?: string | undefined;
  readonly below?: ReactNode;
};

/** Beside so many the figures are set smaller. */
const MANY = 4;

export type FigureCellsProps = {
  readonly cells: readonly FigureCell[];
  /** On a sheet of their own; without it they lie on one already. */
  readonly framed?: boolean;
};

/** A few large figures beside one another, each with its name above and what it means below; one under the other on a phone. */
export function FigureCells({ cells, framed = false }: FigureCellsProps) {
  return (
    <dl
      className={classNames(
        'grid bg-sheet sm:grid-flow-col sm:auto-cols-fr',
        framed ? 'border border-ink' : 'border border-rule',
      )}
    >
      {cells.map(({ name, figure, beside, below }) => (
        <div
          key={name}
          className="min-w-0 border-t border-rule px-4 py-3 first:border-t-0 sm:border-t-0 sm:border-l sm:px-5 sm:first:border-l-0"
        >
          <dt className="text-ink-2">{name}</dt>
          <dd>
            <span className="flex flex-wrap items-baseline gap-x-2">
              <span
                className={classNames('font-semibold tracking-[-0.02em]', cells.length > MANY ? 'text-20' : 'text-27')}
              >
                <Figures text={figure} />
              </span>
              {beside === undefined ? null : (
                <span className="text-ink-2">
                  <Figures text={beside} />
                </span>
              )}
            </span>
            {below === undefined ? null : <span className="block text-ink-2">{below}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}
