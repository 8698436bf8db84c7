import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense, useMemo } from 'react';
import type { PumpNow, ReadingSeries } from '#shared/contract/http/pumps.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import { type ReadingWindow, readingQueries } from './reading-queries.ts';
import { ReadingTable } from './reading-table.tsx';
import { appendNow, hasReadings } from './reading-view.ts';

/** The chart library comes only when a chart is looked at. */
const TimeChart = lazy(async () => ({
  default: (await import('#src/components/charts/time-chart/time-chart.tsx')).TimeChart,
}));

export type ReadingChartsProps = {
  readonly pumpId: string;
  readonly window: ReadingWindow;
  readonly zone: string;
  readonly now: PumpNow | null;
  readonly growing: boolean;
  readonly topRpm: number;
  readonly cursor: CursorStore;
};

const HEIGHT = 190;
const LEAST_WATTS = 300;

const speedLines = (series: ReadingSeries) => ({
  times: series.t,
  lines: [
    { label: t('pump.chart.measured'), values: series.rpm, band: { low: series.rpmMin, high: series.rpmMax } },
    { label: t('pump.chart.expected'), values: series.expectedRpm, dashed: true },
  ],
});

const wattLines = (series: ReadingSeries) => ({
  times: series.t,
  lines: [
    { label: t('pump.chart.watts'), values: series.watts, band: { low: series.wattsMin, high: series.wattsMax } },
  ],
});

const Ruled = () => <div className="ruled ml-14" style={{ height: HEIGHT }} />;

/** Measured against expected speed, and watts, one cursor over both; their numbers in a table one click away. */
export function ReadingCharts({ pumpId, window, zone, now, growing, topRpm, cursor }: ReadingChartsProps) {
  const { data, isPending, isError, error, refetch } = useQuery(readingQueries.series(pumpId, window, growing));
  const series = useMemo(
    () => (data === undefined ? undefined : appendNow(data, growing ? now : null, window.until)),
    [data, now, growing, window.until],
  );
  const speed = useMemo(() => series && speedLines(series), [series]);
  const watts = useMemo(() => series && wattLines(series), [series]);
  if (isError) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  if (series !== undefined && !hasReadings(series)) {
    return <p className="px-5 py-4 text-ink-2">{t('pump.chart.empty')}</p>;
  }
  const shared = { window, zone, cursor, height: HEIGHT };
  return (
    <div aria-busy={isPending} className="px-4 py-3 sm:px-5">
      <h3 className="pb-1 text-13 text-ink-2">
        {t('pump.chart.speed')}
        <span aria-hidden="true" className="ml-4 inline-block w-6 border-t-2 border-ink align-middle" />{' '}
        {t('pump.chart.measured')}
        <span aria-hidden="true" className="ml-4 inline-block w-6 border-t-2 border-dashed border-ink-3 align-middle" />{' '}
        {t('pump.chart.expected')}
      </h3>
      <Suspense
        fallback={
          <>
            <Ruled />
            <h3 className="pt-3 pb-1 text-13 text-ink-2">{t('pump.chart.watts')}</h3>
            <Ruled />
          </>
        }
      >
        {speed === undefined ? (
          <Ruled />
        ) : (
          <TimeChart {...shared} data={speed} least={topRpm} name={t('pump.chart.speed')} />
        )}
        <h3 className="pt-3 pb-1 text-13 text-ink-2">{t('pump.chart.watts')}</h3>
        {watts === undefined ? (
          <Ruled />
        ) : (
          <TimeChart {...shared} data={watts} least={LEAST_WATTS} name={t('pump.chart.watts')} />
        )}
      </Suspense>
      {series === undefined ? null : (
        <TableToggle label={t('pump.chart.tableOf')}>
          <p className="pb-2 text-13 text-ink-2">
            {t('pump.chart.coverage', { share: Math.round(series.coverage * 100) })}
          </p>
          <ReadingTable series={series} zone={zone} />
        </TableToggle>
      )}
    </div>
  );
}
