import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import type { Run } from '#shared/contract/http/runs.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { energyQueries } from './energy-queries.ts';
import { HomeSaved } from './home-saved.tsx';
import { costCell, type HomeCell, turnoverLine, waterCell } from './home-words.ts';
import { dayAfter, dayAt, monthAt, nameOfMonth } from './local-month.ts';
import { SpanBars } from './span-bars.tsx';
import { TurnoverBar } from './turnover-bar.tsx';

export type HomeEnergyProps = {
  readonly pumpId: string;
  readonly zone: string;
  readonly poolGallons: number | null;
  /** From when on there may be something to see: the motor's or the owner's first day, whichever is later. */
  readonly since: number;
  /** Runs of today. */
  readonly runs: readonly Run[];
  readonly dayFrom: number;
  readonly now: number;
};

const CELL = 'min-w-0 border-t border-rule px-5 py-4 first:border-t-0 md:border-t-0 md:border-l md:first:border-l-0';

function Cell({
  name,
  cell,
  children,
}: {
  readonly name: string;
  readonly cell: HomeCell;
  readonly children?: ReactNode;
}) {
  return (
    <div className={CELL}>
      <h2 className="text-ink-2">{name}</h2>
      <p className="flex flex-wrap items-baseline gap-x-2">
        <span className="text-34 font-semibold tracking-[-0.03em]">
          <Figures text={cell.figure} />
        </span>
        {cell.beside === undefined ? null : (
          <span className="text-17">
            <Figures text={cell.beside} />
          </span>
        )}
      </p>
      {children}
      {cell.lines.map((line) => (
        <p key={line} className="text-ink-2">
          <Figures text={line} />
        </p>
      ))}
    </div>
  );
}

/** Water, money and what was saved, for the person who lives with the pump. */
export function HomeEnergy({ pumpId, zone, poolGallons, since, runs, dayFrom, now }: HomeEnergyProps) {
  const format = useFormat();
  const today = dayAt(zone, now);
  const month = monthAt(zone, now);
  const until = dayAfter(today);
  const ask = (from: string, by: 'day' | 'month') => energyQueries.pump(pumpId, { from, until, by, growing: true });
  const first = dayAt(zone, since);
  const days = useQuery(ask(`${month}-01`, 'day'));
  const months = useQuery(ask(first < until ? first : today, 'month'));
  if (days.data === undefined || months.data === undefined) {
    const failed = days.isError ? days : months.isError ? months : undefined;
    return (
      <section aria-label={t('home.cost')} className="border border-ink bg-sheet">
        {failed === undefined ? (
          <div aria-busy="true" className="ruled h-40">
            <span className="sr-only">{t('home.energy.loading')}</span>
          </div>
        ) : (
          <ErrorNotice error={failed.error} onRetry={() => void failed.refetch()} />
        )}
      </section>
    );
  }
  const span = days.data.spans.find(({ label }) => label === today);
  // Nothing can have been saved before the first reading.
  const savedSince = months.data.spans.find(({ coveredSeconds }) => coveredSeconds > 0)?.label ?? month;
  const water = waterCell(span, poolGallons, format);
  const done = turnoverLine({ runs, from: dayFrom, now, poolGallons, zone }, format);
  return (
    <div className="border border-ink bg-sheet">
      <div className="grid md:grid-cols-3">
        <Cell
          name={t('home.water')}
          cell={{ ...water, lines: [...(done === undefined ? [] : [done]), ...water.lines] }}
        >
          {span?.turnovers === null || span?.turnovers === undefined ? null : (
            <TurnoverBar turnovers={span.turnovers} />
          )}
        </Cell>
        <Cell name={t('home.cost')} cell={costCell(span, days.data, months.data, format)} />
        <div className={CELL}>
          <h2 className="text-ink-2">{t('home.saved', { month: nameOfMonth(savedSince, format.locale) })}</h2>
          <HomeSaved energy={months.data} />
        </div>
      </div>
      <div className="border-t border-rule px-5 py-3">
        <TableToggle label={t('home.energy.days')}>
          <div className="flex flex-col gap-4">
            <SpanBars answer={days.data} file={`energy-${month}`} />
            <SpanBars answer={months.data} file="energy-months" />
          </div>
        </TableToggle>
      </div>
    </div>
  );
}
