import { useMemo, useState } from 'react';
import type { RuleLayer, RuleLayers } from '#shared/contract/http/rules.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/rules-words.ts';
import { BacktestSheet } from './backtest-sheet.tsx';
import { countDifferences, type Draft, draftOf, settingsOf } from './rule-draft.ts';
import { RuleList } from './rule-list.tsx';
import { SaveBar } from './save-bar.tsx';
import { useSetRules } from './use-set-rules.ts';

export type RuleEditorProps = { readonly layer: RuleLayer; readonly layers: RuleLayers };

/** The rules of one scope: changed, tried, saved. What was typed stays when somebody else saves meanwhile. */
export function RuleEditor({ layer, layers }: RuleEditorProps) {
  const format = useFormat();
  const { company } = useSession();
  const now = useNow(60_000);
  const stored = useMemo(() => draftOf(layer.rules, format.units), [layer.rules, format.units]);
  const [changed, setChanged] = useState<Draft>();
  const draft = changed ?? stored;
  const rules = settingsOf(draft, format.units);
  const changes = countDifferences(stored, draft);
  const save = useSetRules();
  const others = [layers.company, ...layers.models, ...layers.pumps].filter(({ scope }) => !isAt(scope, layer.scope));
  return (
    <>
      {layer.changedAt === null ? null : (
        <p className="text-13 text-ink-2">
          {t('rules.last', {
            time: format.moment(layer.changedAt, company.zone, now),
            name: layer.changedBy ?? '–',
          })}
        </p>
      )}
      <RuleList layer={layer} others={others} draft={draft} onChange={setChanged} readOnly={save.isPending} />
      <BacktestSheet scope={layer.scope} rules={rules} hasChanges={changes > 0} />
      <SaveBar
        changes={changes}
        isSaving={save.isPending}
        canSave={rules !== undefined}
        onSave={() => rules !== undefined && save.mutate({ layer, rules }, { onSuccess: () => setChanged(undefined) })}
        onDiscard={() => setChanged(undefined)}
      />
    </>
  );
}

const isAt = (one: RuleLayer['scope'], other: RuleLayer['scope']): boolean =>
  JSON.stringify(one) === JSON.stringify(other);
