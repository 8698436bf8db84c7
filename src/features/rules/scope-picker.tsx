import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { RuleLayers } from '#shared/contract/http/rules.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { t } from '#src/lib/messages/rules-words.ts';
import { ruleQueries, scopeKey } from './rule-queries.ts';

export type ScopePickerProps = {
  readonly layers: RuleLayers;
  readonly value: string;
  /** The pump that was picked, where nothing is set for it yet. */
  readonly picked: { readonly key: string; readonly name: string } | undefined;
  readonly onChange: (key: string) => void;
};

/** For whom the rules are set: the company, a motor model, or a pump that is looked up by name. */
export function ScopePicker({ layers, value, picked, onChange }: ScopePickerProps) {
  const [q, setQ] = useState('');
  const found = useQuery(ruleQueries.findPumps(q));
  const pumps = layers.pumps.map((layer) => ({ key: scopeKey(layer.scope), name: layer.name }));
  const isKnown = picked === undefined || pumps.some(({ key }) => key === picked.key);
  const options = [
    { value: 'company', label: t('rules.scope.company') },
    ...layers.models.map(({ scope, name }) => ({ value: scopeKey(scope), label: t('rules.scope.model', { name }) })),
    ...[...pumps, ...(isKnown || picked === undefined ? [] : [picked])].map(({ key, name }) => ({
      value: key,
      label: t('rules.scope.pump', { name }),
    })),
  ];
  return (
    <div className="flex flex-col gap-2">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
        <Select label={t('rules.scope')} value={value} options={options} onChange={onChange} />
        <span className="flex flex-wrap items-center gap-2 text-ink-2">
          {t('rules.findPump')}
          <SearchField value={q} onSearch={setQ} />
        </span>
      </div>
      {q.trim() === '' ? null : found.isError ? (
        <ErrorNotice error={found.error} onRetry={() => void found.refetch()} />
      ) : (
        <ul className="flex flex-wrap gap-2" aria-label={t('rules.findPump')}>
          {(found.data?.items ?? []).map(({ pumpId, padName, pumpName }) => (
            <li key={pumpId}>
              <Button
                onClick={() => {
                  setQ('');
                  onChange(`pump:${pumpId}`);
                }}
              >
                {t('alarm.where', { pad: padName, pump: pumpName })}
              </Button>
            </li>
          ))}
          {found.data?.items.length === 0 ? <li className="text-ink-2">{t('rules.findPump.none')}</li> : null}
        </ul>
      )}
    </div>
  );
}
