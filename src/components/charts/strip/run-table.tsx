import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { STANDSTILL_RPM, type StripRun } from './strip-run.ts';
import { describeSource, newestFirst } from './strip-words.ts';

export type RunTableProps = {
  readonly runs: readonly StripRun[];
  readonly zone: string;
  readonly now: number;
  readonly caption: string;
};

const CELL = 'border-t border-rule px-3 py-1.5';

/** Everything a strip shows, as text: the same runs, one a row, the latest first. */
export function RunTable({ runs, zone, now, caption }: RunTableProps) {
  const format = useFormat();
  if (runs.length === 0) return <p className="text-ink-2">{t('strip.empty')}</p>;
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">{caption}</caption>
        <thead className="text-13 text-ink-2">
          <tr>
            <th className="px-3 py-1.5 font-medium">{t('strip.from')}</th>
            <th className="px-3 py-1.5 font-medium">{t('strip.to')}</th>
            <th className="px-3 py-1.5 font-medium">{t('strip.lasted')}</th>
            <th className="px-3 py-1.5 font-medium">{t('strip.source')}</th>
            <th className="px-3 py-1.5 text-right font-medium">{t('strip.measured')}</th>
            <th className="px-3 py-1.5 text-right font-medium">{t('strip.expected')}</th>
            <th className="px-3 py-1.5 text-right font-medium">{t('strip.watts')}</th>
          </tr>
        </thead>
        <tbody>
          {newestFirst(runs).map((run) => {
            const unseen = run.source === 'no-data';
            return (
              <tr key={run.from}>
                <td className={`figures ${CELL}`}>{format.moment(run.from, zone, now)}</td>
                <td className={`figures ${CELL}`}>
                  {run.to === null ? t('strip.now') : format.moment(run.to, zone, now)}
                </td>
                <td className={`figures ${CELL}`}>{format.span((run.to ?? now) - run.from)}</td>
                <td className={CELL}>{describeSource(run)}</td>
                <td className={`figures text-right ${CELL}`}>{unseen ? '–' : format.number(run.meanRpm)}</td>
                <td className={`figures text-right ${CELL}`}>
                  {unseen || run.expectedRpm < STANDSTILL_RPM ? '–' : format.number(run.expectedRpm)}
                </td>
                <td className={`figures text-right ${CELL}`}>{unseen ? '–' : format.number(run.meanWatts)}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
