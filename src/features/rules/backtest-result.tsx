import { Link } from 'react-router-dom';
import type { BacktestPump, ComparedAlarm, BacktestResult as Result } from '#shared/contract/http/backtests.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { ruleName, t } from '#src/lib/messages/rules-words.ts';
import { paths } from '#src/lib/paths.ts';
import { BacktestLanes } from './backtest-lanes.tsx';

/** What a backtest found so far: in sum, by rule, and pump by pump where something differs. */
export function BacktestResult({ result }: { readonly result: Result }) {
  const { counts, detectors, needless, differing } = result;
  const alarms = (count: number): string => t('try.alarms', { count });
  const differs = counts.new + counts.gone + counts.changed;
  return (
    <div className="flex flex-col gap-4">
      <p className="text-17 font-semibold">
        {differs === 0
          ? t('try.none')
          : t('try.summary', { before: alarms(counts.before), after: alarms(counts.after) })}
      </p>
      {needless.answered === 0 ? null : (
        <p>{t('try.needless', { count: needless.answered, before: needless.before, after: needless.after })}</p>
      )}
      {result.failedPumps === 0 ? null : (
        <p className="text-p1">{t('try.failedPumps', { count: result.failedPumps })}</p>
      )}
      {detectors.length === 0 ? null : (
        <DataTable
          caption={t('try.byRule')}
          wide
          rows={detectors}
          keyOf={({ detector }) => detector}
          columns={[
            { head: t('try.rule'), cell: ({ detector }) => ruleName(detector) },
            { head: t('try.today'), figures: true, right: true, cell: ({ before }) => before },
            { head: t('try.proposed'), figures: true, right: true, cell: ({ after }) => after },
            { head: t('try.new'), figures: true, right: true, cell: (row) => row.new },
            { head: t('try.gone'), figures: true, right: true, cell: ({ gone }) => gone },
            { head: t('try.changed'), figures: true, right: true, cell: ({ changed }) => changed },
            { head: t('try.same'), figures: true, right: true, cell: ({ same }) => same },
          ]}
        />
      )}
      {differing.map((pump) => (
        <PumpDifferences key={pump.pumpId} pump={pump} from={result.from} to={result.to} />
      ))}
      {result.morePumps === 0 ? null : <p className="text-ink-2">{t('try.more', { count: result.morePumps })}</p>}
    </div>
  );
}

type PumpProps = { readonly pump: BacktestPump; readonly from: number; readonly to: number };

function PumpDifferences({ pump, from, to }: PumpProps) {
  const format = useFormat();
  const rows = pump.alarms.filter(({ difference }) => difference !== 'same');
  return (
    <section
      aria-label={t('alarm.where', { pad: pump.padName, pump: pump.pumpName })}
      className="border-t border-rule pt-3"
    >
      <h3 className="font-semibold">
        <Link to={paths.pump(pump.pumpId)} className="underline-offset-2 hover:underline">
          {t('alarm.where', { pad: pump.padName, pump: pump.pumpName })}
        </Link>
      </h3>
      <BacktestLanes alarms={pump.alarms} from={from} to={to} />
      <DataTable
        caption={t('try.what')}
        wide
        rows={rows}
        keyOf={(_, index) => index}
        columns={[
          { head: t('try.what'), cell: ({ difference }) => t(`try.difference.${difference}`) },
          { head: t('try.rule'), cell: ({ before, after }) => ruleName((before ?? after)?.detector ?? '') },
          { head: t('try.today'), cell: ({ before }) => describe(before, pump.zone, format) },
          { head: t('try.proposed'), cell: ({ after }) => describe(after, pump.zone, format) },
        ]}
      />
    </section>
  );
}

/** When it would have spoken, how loudly, and for how long it stood. */
function describe(alarm: ComparedAlarm['before'], zone: string, format: Format): string {
  if (alarm === null) return t('try.never');
  const { raised, to, priority } = alarm;
  const time = `${format.day(raised, zone)}, ${format.time(raised, zone)}`;
  const lasted = to === null ? t('try.stands') : t('try.lasted', { span: format.span(to - raised) });
  return `${t('try.speaksAt', { time, priority: t(`mark.${priority}`) })}, ${lasted}`;
}
