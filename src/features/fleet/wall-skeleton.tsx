import { t } from '#src/lib/messages/t.ts';
import { FLEET_COLUMNS } from './fleet-columns.ts';

const ROWS = [0, 1, 2, 3, 4, 5, 6, 7];

/** The wall before its first reading has come: ruled paper without ink. */
export function WallSkeleton() {
  return (
    <div aria-busy="true" className="border border-ink bg-sheet">
      <p role="status" className="sr-only">
        {t('shell.loading')}
      </p>
      <div className="h-8 border-b border-ink" />
      {ROWS.map((row) => (
        <div
          key={row}
          aria-hidden="true"
          className={`h-31 border-t border-rule first:border-0 md:h-16 ${FLEET_COLUMNS}`}
        >
          <div />
          <div />
          <div className="ruled order-last col-span-full h-16 md:order-none md:col-span-1" />
        </div>
      ))}
    </div>
  );
}
