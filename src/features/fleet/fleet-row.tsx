import { memo, useMemo, useState } from 'react';
import { Link } from 'react-router-dom';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { StripCanvas } from '#src/components/charts/strip/strip-canvas.tsx';
import { USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripState, StripWindow } from '#src/components/charts/strip/strip-run.ts';
import { CursorLine, type CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { withSilence } from '#src/components/charts/strip/with-silence.ts';
import { type MarkKind, PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { unprimedSince } from '#src/lib/unprimed-since.ts';
import { FLEET_COLUMNS } from './fleet-columns.ts';
import { RowRunsDialog } from './row-runs-dialog.tsx';
import { isElsewhere, viewRow } from './row-view.ts';
import { useInstantView } from './use-instant-view.ts';

export type FleetRowProps = {
  readonly row: PumpRow;
  readonly strip: StripState;
  readonly window: StripWindow;
  readonly width: number;
  readonly companyZone: string;
  readonly now: number;
  readonly cursor: CursorStore;
  /** The row above is of the same pad. */
  readonly continues: boolean;
};

const LINE_TONE: Readonly<Record<MarkKind, string>> = {
  urgent: 'text-p1',
  soon: 'text-p2',
  note: 'text-p3',
  silent: 'text-ink-2',
};

/** One pump on the wall: mark, name and why, strip, speed and watts now, or at the instant under the cursor. */
export const FleetRow = memo(function FleetRow(props: FleetRowProps) {
  const { row, strip, window, width, companyZone, now, cursor, continues } = props;
  const format = useFormat();
  const [table, setTable] = useState(false);
  const runs = useMemo(() => withSilence(strip.runs, row.silentSince), [strip.runs, row.silentSince]);
  const view = viewRow(row, format, now);
  const then = useInstantView({ row, runs, window, cursor, now });
  const pointed = then?.pointed === true;
  const name = row.pumpName === '' ? row.padName : `${row.padName}, ${row.pumpName}`;
  return (
    <div
      className={`group relative h-full items-center border-t hover:bg-paper/60 ${continues ? 'border-transparent' : 'border-rule'} ${FLEET_COLUMNS}`}
    >
      <div className="row-span-1 flex justify-center">
        {view.mark === undefined ? null : <PriorityMark kind={view.mark} acknowledged={view.acknowledged} />}
      </div>
      <div className="min-w-0 px-2.5">
        <Link
          to={paths.pump(row.pumpId)}
          className="block truncate font-semibold after:absolute after:inset-0 focus-visible:outline-none focus-visible:after:outline-2 focus-visible:after:-outline-offset-2 focus-visible:after:outline-focus"
        >
          {row.padName}
          {row.pumpName === '' ? null : <span className="ml-1.5 text-13 font-normal text-ink-2">{row.pumpName}</span>}
        </Link>
        <p
          className={`line-clamp-2 text-13 md:line-clamp-1 ${pointed ? 'text-focus' : then !== undefined || view.mark === undefined ? 'text-ink-2' : LINE_TONE[view.mark]}`}
        >
          {then?.line ?? view.line}
          {isElsewhere(row, companyZone, now) ? (
            <span className="text-ink-2"> · {t('fleet.otherZone', { time: format.time(now, row.zone) })}</span>
          ) : null}
        </p>
      </div>
      <div className="relative order-last col-span-full h-16 md:order-none md:col-span-1">
        <StripCanvas
          size="row"
          width={width}
          runs={runs}
          planned={strip.planned}
          window={window}
          now={now}
          tone={row.alarm?.priority ?? 'soon'}
          unprimedSince={unprimedSince(row.alarm)}
          topRpm={Math.max(USUAL_TOP_RPM, row.settings.maxRpm)}
          zone={companyZone}
        />
        {strip.failed && runs === undefined ? (
          <p className="absolute top-1 left-2 text-13 text-ink-2">{t('strip.failed')}</p>
        ) : null}
        <CursorLine cursor={cursor} window={window} />
        <button
          type="button"
          onClick={() => setTable(true)}
          aria-label={t('strip.tableOf', { name })}
          className="absolute right-1 bottom-1.5 z-10 min-h-6 rounded-control border border-ink bg-sheet px-2 text-13 opacity-0 transition-opacity focus-visible:opacity-100 group-hover:opacity-100"
        >
          {t('strip.table')}
        </button>
      </div>
      <div className="pr-2.5 text-right md:contents">
        <Cell label={t('fleet.column.speed')} unit={t('unit.rpm')} value={then?.rpm ?? view.rpm} pointed={pointed} />
        <Cell
          label={t('fleet.column.watts')}
          unit={t('unit.watts')}
          value={then?.watts ?? view.watts}
          pointed={pointed}
        />
      </div>
      {table ? (
        <RowRunsDialog name={name} runs={runs} zone={row.zone} now={now} onClose={() => setTable(false)} />
      ) : null}
    </div>
  );
});

type CellProps = { readonly label: string; readonly unit: string; readonly value: string; readonly pointed: boolean };

/** A figure; its unit stands in the column's head, or beside it where a phone has no columns. */
function Cell({ label, unit, value, pointed }: CellProps) {
  return (
    <p className={`figures text-15 font-medium md:px-2.5 md:text-right md:text-17 ${pointed ? 'text-focus' : ''}`}>
      <span className="sr-only">{label} </span>
      {value}
      <span aria-hidden="true" className="ml-1 text-13 text-ink-2 md:hidden">
        {unit}
      </span>
    </p>
  );
}
