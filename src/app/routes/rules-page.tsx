import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { RuleLayers } from '#shared/contract/http/rules.ts';
import { SettingsPages } from '#src/app/shell/settings-pages.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { PendingSheet } from '#src/components/ui/pending-sheet.tsx';
import { RuleEditor } from '#src/features/rules/rule-editor.tsx';
import { isSameScope, ruleQueries } from '#src/features/rules/rule-queries.ts';
import { ScopePicker } from '#src/features/rules/scope-picker.tsx';
import { t } from '#src/lib/messages/rules-words.ts';

const COMPANY = 'company';
const PUMP = 'pump:';

/** Settings › Alarm rules: when each rule speaks, for the company, a motor model or a pump. */
export function RulesPage() {
  const { data, error, refetch } = useQuery(ruleQueries.all());
  return (
    <div className="mx-auto flex max-w-6xl flex-col gap-4 px-4 py-5 sm:px-7">
      <SettingsPages />
      <div>
        <PageHeading title={t('rules.page')}>{t('rules.page')}</PageHeading>
        <p className="mt-1 max-w-prose text-ink-2">{t('rules.lead')}</p>
      </div>
      {data !== undefined ? (
        <Loaded layers={data} />
      ) : (
        <PendingSheet error={error ?? undefined} onRetry={() => void refetch()} />
      )}
    </div>
  );
}

function Loaded({ layers }: { readonly layers: RuleLayers }) {
  const [search, setSearch] = useSearchParams();
  const key = search.get('for') ?? COMPANY;
  const pumpId = key.startsWith(PUMP) ? key.slice(PUMP.length) : '';
  const known = [layers.company, ...layers.models, ...layers.pumps].find((layer) => isSameScope(layer, key));
  const pump = useQuery({ ...ruleQueries.ofPump(pumpId), enabled: pumpId !== '' && known === undefined });
  const layer = known ?? pump.data;
  return (
    <>
      <ScopePicker
        layers={layers}
        value={key}
        picked={layer === undefined || pumpId === '' ? undefined : { key, name: layer.name }}
        onChange={(next) => setSearch(next === COMPANY ? {} : { for: next }, { preventScrollReset: true })}
      />
      {layer !== undefined ? (
        <RuleEditor key={key} layer={layer} layers={layers} />
      ) : pump.isError ? (
        <ErrorNotice error={pump.error} onRetry={() => void pump.refetch()} />
      ) : (
        <div aria-busy="true" className="ruled h-96 border border-ink bg-sheet" />
      )}
    </>
  );
}
