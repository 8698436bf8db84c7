import { type KeyboardEvent, type PointerEvent, useRef, useState } from 'react';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { type Area, areaBetween, isWithin } from './edit-schedule.ts';
import { periodLook } from './period-look.ts';
import { hoursText, monthName, periodName, stretchText } from './period-words.ts';
import { HOURS, type MatrixDraft, MONTHS, type PeriodDraft } from './tariff-draft.ts';

type Cell = { readonly month: number; readonly hour: number };

export type ScheduleGridProps = {
  readonly name: string;
  readonly matrix: MatrixDraft;
  readonly periods: readonly PeriodDraft[];
  /** The period that drawing fills with. */
  readonly brush: number;
  readonly onFill: (area: Area, period: number) => void;
};

const MOVES: Readonly<Record<string, (cell: Cell) => Cell>> = {
  ArrowLeft: ({ month, hour }) => ({ month, hour: Math.max(0, hour - 1) }),
  ArrowRight: ({ month, hour }) => ({ month, hour: Math.min(HOURS - 1, hour + 1) }),
  ArrowUp: ({ month, hour }) => ({ month: Math.max(0, month - 1), hour }),
  ArrowDown: ({ month, hour }) => ({ month: Math.min(MONTHS - 1, month + 1), hour }),
  Home: ({ month }) => ({ month, hour: 0 }),
  End: ({ month }) => ({ month, hour: HOURS - 1 }),
};

const SIX = [0, 6, 12, 18];

/** The cell under a pointer, wherever it was pressed. */
function cellAt({ clientX, clientY }: PointerEvent): Cell | undefined {
  const cell = document.elementFromPoint(clientX, clientY)?.closest<HTMLElement>('td[data-hour]');
  return cell === null || cell === undefined
    ? undefined
    : { month: Number(cell.dataset.month), hour: Number(cell.dataset.hour) };
}

/** Months by hours as a picture that is filled by drawing over it, or by keyboard. */
export function ScheduleGrid({ name, matrix, periods, brush, onFill }: ScheduleGridProps) {
  const format = useFormat();
  const table = useRef<HTMLTableElement>(null);
  const [at, setAt] = useState<Cell>({ month: 0, hour: 0 });
  const [anchor, setAnchor] = useState<Cell>();
  const [isDrawing, setDrawing] = useState(false);
  const [said, setSaid] = useState('');
  const area = anchor === undefined ? undefined : areaBetween(anchor, at);

  const fill = (filled: Area, period: number) => {
    const { fromMonth, toMonth, fromHour, toHour } = filled;
    const what = stretchText({ fromMonth, toMonth, from: fromHour, to: toHour + 1 }, format);
    onFill(filled, period);
    setAnchor(undefined);
    setSaid(t('grid.filled', { what, period: periodName(periods, period) }));
  };
  const move = (next: Cell, keeps: boolean) => {
    setAnchor(keeps ? (anchor ?? at) : undefined);
    setAt(next);
    table.current?.querySelector<HTMLElement>(`[data-month="${next.month}"][data-hour="${next.hour}"]`)?.focus();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const step = MOVES[event.key];
    const digit = /^[1-9]$/.test(event.key) ? Number(event.key) - 1 : undefined;
    if (step !== undefined) move(step(at), event.shiftKey);
    else if (event.key === 'Enter' || event.key === ' ') fill(area ?? areaBetween(at, at), brush);
    else if (digit !== undefined && digit < periods.length) fill(area ?? areaBetween(at, at), digit);
    else if (event.key === 'Escape' && anchor !== undefined) setAnchor(undefined);
    else return;
    event.preventDefault();
  };
  const onPointerDown = (event: PointerEvent<HTMLTableElement>) => {
    const cell = cellAt(event);
    if (cell === undefined || event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    setDrawing(true);
    setAt(cell);
    setAnchor(cell);
  };
  const onPointerMove = (event: PointerEvent) => {
    const cell = isDrawing ? cellAt(event) : undefined;
    if (cell !== undefined) setAt(cell);
  };
  const endDrawing = (isKept: boolean) => {
    if (!isDrawing) return;
    setDrawing(false);
    if (isKept && area !== undefined) fill(area, brush);
    else setAnchor(undefined);
  };
  return (
    <div className="flex flex-col gap-1">
      <table
        ref={table}
        // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: a grid of hours is chosen from and filled.
        role="grid"
        aria-label={name}
        aria-multiselectable="true"
        className="w-full table-fixed touch-pan-y select-none border-collapse"
        onKeyDown={onKeyDown}
        onPointerDown={onPointerDown}
        onPointerMove={onPointerMove}
        onPointerUp={() => endDrawing(true)}
        onPointerCancel={() => endDrawing(false)}
      >
        <thead>
          <tr className="figures text-13 text-ink-2">
            <td className="w-10" />
            {SIX.map((hour) => (
              <th key={hour} scope="colgroup" colSpan={6} className="truncate py-1 text-left font-normal">
                {format.minuteOfDay(hour * 60)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {matrix.map((hours, month) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a row is its month.
            <tr key={month} className="h-6">
              <th scope="row" className="figures pr-1 text-left text-13 font-normal text-ink-2">
                {monthName(month, format.locale, 'short')}
              </th>
              {hours.map((period, hour) => (
                <td
                  // biome-ignore lint/suspicious/noArrayIndexKey: a cell is its hour.
                  key={hour}
                  // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: see the grid.
                  role="gridcell"
                  data-month={month}
                  data-hour={hour}
                  tabIndex={month === at.month && hour === at.hour ? 0 : -1}
                  aria-selected={area !== undefined && isWithin(area, month, hour)}
                  aria-label={t('grid.cell', {
                    month: monthName(month, format.locale),
                    hours: hoursText(hour, hour + 1, format),
                    period: periodName(periods, period),
                  })}
                  onFocus={() => setAt({ month, hour })}
                  style={periodLook(period)}
                  className="figures overflow-hidden border border-rule-strong p-0 text-center text-13 leading-none aria-selected:border-2 aria-selected:border-focus"
                >
                  {hour > 0 && hours[hour - 1] === period ? null : (
                    <span aria-hidden="true" className="bg-sheet px-px">
                      {period === null ? '?' : period + 1}
                    </span>
                  )}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      <p aria-live="polite" className="min-h-5 text-13 text-ink-2">
        {said}
      </p>
    </div>
  );
}
