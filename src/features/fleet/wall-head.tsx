import type { RefCallback } from 'react';
import { handleBox, restingAt } from '#src/components/charts/strip/handle-box.ts';
import { StripAxis } from '#src/components/charts/strip/strip-axis.tsx';
import type { StripWindow } from '#src/components/charts/strip/strip-run.ts';
import { CursorHandle, CursorLine, type CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { FLEET_COLUMNS } from './fleet-columns.ts';

export type WallHeadProps = {
  readonly window: StripWindow;
  readonly zone: string;
  readonly now: number;
  readonly cursor: CursorStore;
  readonly track: RefCallback<HTMLDivElement>;
  readonly width: number;
  readonly onResort: (() => void) | undefined;
};

/** The wall's axis and column names; it stays in sight while the wall scrolls. The time on it is the cursor's handle. */
export function WallHead({ window, zone, now, cursor, track, width, onResort }: WallHeadProps) {
  const format = useFormat();
  const long = window.until - window.from > 2 * 86_400_000;
  const textOf = (at: number) => (long ? `${format.day(at, zone)}, ${format.time(at, zone)}` : format.time(at, zone));
  const resting = restingAt(now, window);
  return (
    <div
      className={`sticky top-0 z-20 min-h-8 items-end border-b border-ink bg-sheet text-13 text-ink-2 ${FLEET_COLUMNS}`}
    >
      <div className="hidden md:block" />
      {onResort === undefined ? (
        <div className="hidden px-2.5 pb-1.5 md:block">{t('fleet.column.pump')}</div>
      ) : (
        <button
          type="button"
          onClick={onResort}
          className="col-span-full min-h-8 self-center border-b border-ink bg-wash px-2.5 text-left font-medium text-ink underline underline-offset-2 md:col-span-1 md:border-0"
        >
          {t('fleet.resort')}
        </button>
      )}
      <div ref={track} data-track className="relative col-span-full h-8 md:col-span-1">
        <StripAxis
          window={window}
          zone={zone}
          width={width}
          clearOf={handleBox(resting, window, width, textOf(resting).length)}
        />
        <CursorLine cursor={cursor} window={window} />
        <CursorHandle
          cursor={cursor}
          window={window}
          now={now}
          width={width}
          textOf={textOf}
          describe={(at) => `${format.day(at, zone)}, ${format.time(at, zone)}`}
          className="top-1"
        />
      </div>
      <div className="hidden px-2.5 pb-1.5 text-right md:block">{t('fleet.column.speed')}</div>
      <div className="hidden px-2.5 pb-1.5 text-right md:block">{t('fleet.column.watts')}</div>
    </div>
  );
}
