import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense, useMemo, useState } from 'react';
import { t } from '#src/lib/messages/page-words.ts';
import { createStore } from '#src/lib/store.ts';
import { chartAround, wattsBeside } from './evidence-chart-view.ts';
import { readingQueries } from './reading-queries.ts';
import { hasReadings } from './reading-view.ts';

const TimeChart = lazy(async () => ({
  default: (await import('#src/components/charts/time-chart/time-chart.tsx')).TimeChart,
}));

export type EvidenceChartProps = {
  readonly pumpId: string;
  /** When the condition began. */
  readonly from: number;
  readonly zone: string;
  readonly now: number;
  /** Watts that would be usual, where the rule knows them. */
  readonly usualWatts: number | undefined;
};

const HEIGHT = 130;

const Ruled = () => <div className="ruled ml-14" style={{ height: HEIGHT }} />;

/** The watts around the beginning of an alarm, beside what they usually are. */
export function EvidenceChart({ pumpId, from, zone, now, usualWatts }: EvidenceChartProps) {
  const [cursor] = useState(() => createStore<number | undefined>(undefined));
  const around = chartAround(from, now);
  const window = useMemo(() => ({ from: around.from, until: around.until }), [around.from, around.until]);
  const { data } = useQuery(readingQueries.series(pumpId, window, now < window.until));
  const chart = useMemo(() => data && wattsBeside(data, usualWatts), [data, usualWatts]);
  if (data !== undefined && !hasReadings(data)) return null;
  return (
    <figure>
      <figcaption className="pb-1 text-13 text-ink-2">
        {t('pump.chart.watts')}
        {usualWatts === undefined ? null : (
          <>
            <span
              aria-hidden="true"
              className="ml-4 inline-block w-6 border-t-2 border-dashed border-ink-3 align-middle"
            />{' '}
            {t('alarm.usualWatts')}
          </>
        )}
      </figcaption>
      <Suspense fallback={<Ruled />}>
        {chart === undefined ? (
          <Ruled />
        ) : (
          <TimeChart
            data={chart}
            window={window}
            zone={zone}
            cursor={cursor}
            height={HEIGHT}
            least={(usualWatts ?? 0) * 1.05 || 100}
            name={t('alarm.wattsAround')}
          />
        )}
      </Suspense>
    </figure>
  );
}
