import type { AlarmHealthFigures } from '#shared/contract/http/alarm-health.ts';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { classNames } from '#src/lib/class-names.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { type HealthFact, listFacts } from './health-view.ts';

const ROW =
  'grid gap-x-5 gap-y-0.5 border-t border-rule px-4 py-2.5 first:border-0 sm:px-5 md:grid-cols-[11rem_minmax(0,3fr)_minmax(0,2.4fr)_9rem] md:items-baseline';

/** A verdict in words; one that is over stands on ink, so that it is seen without colour. */
function Verdict({ verdict }: Pick<HealthFact, 'verdict'>) {
  return (
    <span
      className={classNames(
        'justify-self-start py-0.5 md:justify-self-end',
        verdict === 'over'
          ? 'bg-ink px-1.5 font-semibold text-sheet'
          : verdict === 'most'
            ? 'border border-ink px-1.5'
            : 'text-ink-2',
      )}
    >
      {t(`health.verdict.${verdict}`)}
    </span>
  );
}

const exportRows = (facts: readonly HealthFact[]) => [
  [
    t('health.column.metric'),
    t('health.column.found'),
    t('health.column.target'),
    t('health.column.verdict'),
    t('health.column.source'),
  ],
  ...facts.map(({ name, found, target, verdict, source }) => [
    name,
    found,
    target,
    t(`health.verdict.${verdict}`),
    source,
  ]),
];

/** Every figure as a sentence beside what the standard asks for. */
export function HealthFacts({ figures, zone }: { readonly figures: AlarmHealthFigures; readonly zone: string }) {
  const format = useFormat();
  const facts = listFacts(figures, format, zone);
  const sources = [...new Set(facts.map(({ source }) => source))].join('; ');
  return (
    <Sheet
      id="figures"
      title={t('health.figures')}
      aside={<ExportButton name="alarm-health" rows={() => exportRows(facts)} />}
    >
      <ul>
        {facts.map(({ metric, name, found, target, verdict }) => (
          <li key={metric} className={ROW}>
            <span className="font-semibold">{name}</span>
            <span>
              <Figures text={found} />
            </span>
            <span className="text-ink-2">
              <Figures text={target} />
            </span>
            <Verdict verdict={verdict} />
          </li>
        ))}
      </ul>
      <div className="flex flex-col gap-1 border-t border-rule px-4 py-3 text-13 text-ink-2 sm:px-5">
        <p>{t('health.notesApart')}</p>
        <p>{t('health.sources', { sources })}</p>
      </div>
    </Sheet>
  );
}
