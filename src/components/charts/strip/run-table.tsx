import { DataTable } from '#src/components/ui/data-table.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { STANDSTILL_RPM, type StripRun } from './strip-run.ts';
import { describeSource, newestFirst } from './strip-words.ts';

export type RunTableProps = {
  /** Undefined until they have come. */
  readonly runs: readonly StripRun[] | undefined;
  readonly zone: string;
  readonly now: number;
  readonly caption: string;
};

/** Everything a strip shows, as text: the same runs, one a row, the latest first. */
export function RunTable({ runs, zone, now, caption }: RunTableProps) {
  const format = useFormat();
  if (runs === undefined)
    return (
      <div aria-busy="true">
        <p role="status" className="sr-only">
          {t('shell.loading')}
        </p>
        <div aria-hidden="true" className="ruled h-20" />
      </div>
    );
  if (runs.length === 0) return <p className="text-ink-2">{t('strip.empty')}</p>;
  const figure = (run: StripRun, value: number) => (run.source === 'no-data' ? '–' : format.number(value));
  return (
    <DataTable
      wide
      caption={caption}
      rows={newestFirst(runs)}
      keyOf={({ from }) => from}
      columns={[
        { head: t('strip.from'), figures: true, cell: ({ from }: StripRun) => format.moment(from, zone, now) },
        {
          head: t('strip.to'),
          figures: true,
          cell: ({ to }) => (to === null ? t('strip.now') : format.moment(to, zone, now)),
        },
        { head: t('strip.lasted'), figures: true, cell: ({ from, to }) => format.span((to ?? now) - from) },
        { head: t('strip.source'), cell: describeSource },
        { head: t('strip.measured'), figures: true, right: true, cell: (run) => figure(run, run.meanRpm) },
        {
          head: t('strip.expected'),
          figures: true,
          right: true,
          cell: (run) => (run.expectedRpm < STANDSTILL_RPM ? '–' : figure(run, run.expectedRpm)),
        },
        { head: t('strip.watts'), figures: true, right: true, cell: (run) => figure(run, run.meanWatts) },
      ]}
    />
  );
}
