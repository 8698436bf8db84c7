import { useQuery } from '@tanstack/react-query';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { DearHours } from './dear-hours.tsx';
import { energyQueries } from './energy-queries.ts';
import { ProgramComparison } from './program-comparison.tsx';
import { listObstacles, nameOfMonthNumber, programHeading } from './program-view.ts';

export type PumpAdviceSheetProps = {
  readonly pumpId: string;
  readonly name: string;
  readonly zone: string;
  readonly now: number;
};

/** The advice for one pump's program as it was last worked out, with what stands in its way. */
export function PumpAdviceSheet({ pumpId, name, zone, now }: PumpAdviceSheetProps) {
  const format = useFormat();
  const { data, isError, error, refetch } = useQuery(energyQueries.advice(pumpId));
  const advice = data?.advice;
  return (
    <Sheet id="advice" title={t('program.of')}>
      {data === undefined ? (
        isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="ruled h-32" />
        )
      ) : advice === null || advice === undefined ? (
        <p className="px-4 py-3 text-ink-2 sm:px-5">{t('program.ofNone')}</p>
      ) : (
        <div className="flex flex-col gap-2 px-4 py-3 sm:px-5">
          <p className="text-17">
            <Figures text={programHeading(advice, format)} />
          </p>
          <ul>
            {listObstacles(advice).map((obstacle) => (
              <li key={obstacle}>{obstacle}</li>
            ))}
          </ul>
          <DearHours dearHours={advice.dearHours} currency={advice.currency} />
          {advice.before === null ? null : (
            <ProgramComparison name={name} before={advice.before} after={advice.after} currency={advice.currency} />
          )}
          <p className="text-13 text-ink-2">
            {t('program.caution', { month: nameOfMonthNumber(advice.month, format.locale) })}{' '}
            <Figures text={t('program.madeAt', { time: format.moment(advice.madeAt, zone, now) })} />
          </p>
        </div>
      )}
    </Sheet>
  );
}
