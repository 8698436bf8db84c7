import { type ComponentType, type ReactNode, useEffect, useMemo, useRef } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { StripState, StripWindow } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { usePointerInstant } from '#src/components/charts/strip/use-pointer-instant.ts';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useMediaQuery } from '#src/hooks/use-media-query.ts';
import { useVisibleRows } from '#src/hooks/use-visible-rows.ts';
import { useWatchedPumps } from '#src/hooks/use-watched-pumps.ts';
import { t } from '#src/lib/messages/t.ts';
import { ROW_HEIGHT, WIDE } from './fleet-columns.ts';
import { FleetRow } from './fleet-row.tsx';
import { WallHead } from './wall-head.tsx';

/** Brings the runs of one pump; given by the page, since runs belong to another feature. */
export type StripSource = ComponentType<{
  readonly pumpId: string;
  readonly window: StripWindow;
  readonly children: (strip: StripState) => ReactNode;
}>;

export type FleetWallProps = {
  readonly rows: readonly PumpRow[];
  readonly matching: number;
  readonly window: StripWindow;
  readonly companyZone: string;
  readonly now: number;
  readonly cursor: CursorStore;
  readonly StripSource: StripSource;
  readonly onNearEnd: () => void;
  /** Takes the truer order, where there is one. */
  readonly onResort: (() => void) | undefined;
};

/** Rows before the end at which the next page is asked for. */
const NEAR_END = 30;

/** The wall: every pump's strip on one axis, only what is near the screen on the page, however many there are. */
export function FleetWall(props: FleetWallProps) {
  const { rows, matching, window, companyZone, now, cursor, StripSource, onNearEnd, onResort } = props;
  const [track, width] = useElementWidth<HTMLDivElement>();
  const list = useRef<HTMLUListElement>(null);
  const height = useMediaQuery(WIDE) ? ROW_HEIGHT.wide : ROW_HEIGHT.narrow;
  const { first, end } = useVisibleRows(list, rows.length, height);
  const shown = rows.slice(first, end);
  useEffect(() => {
    if (end >= rows.length - NEAR_END) onNearEnd();
  }, [end, rows.length, onNearEnd]);
  const visible = shown.map(({ pumpId }) => pumpId);
  useWatchedPumps(visible);
  const pointer = usePointerInstant(cursor, window);
  const stable = useMemo(() => ({ from: window.from, until: window.until }), [window.from, window.until]);

  return (
    <div className="border border-ink bg-sheet" {...pointer}>
      <WallHead
        window={stable}
        zone={companyZone}
        now={now}
        cursor={cursor}
        track={track}
        width={width}
        onResort={onResort}
      />
      <ul ref={list} aria-label={t('fleet.wall')} className="relative" style={{ height: rows.length * height }}>
        {shown.map((row, offset) => {
          const index = first + offset;
          return (
            <li
              key={row.pumpId}
              aria-setsize={matching}
              aria-posinset={index + 1}
              className="absolute inset-x-0 top-0"
              style={{ height, transform: `translateY(${index * height}px)` }}
            >
              <StripSource pumpId={row.pumpId} window={stable}>
                {(strip) => (
                  <FleetRow
                    row={row}
                    strip={strip}
                    window={stable}
                    width={width}
                    companyZone={companyZone}
                    now={now}
                    cursor={cursor}
                    continues={index > 0 && rows[index - 1]?.padId === row.padId}
                  />
                )}
              </StripSource>
            </li>
          );
        })}
      </ul>
    </div>
  );
}
