import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { PadTerms, TariffRow } from '#shared/contract/http/tariffs.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Field } from '#src/components/ui/field.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { SaveLine } from './save-line.tsx';
import { tariffQueries } from './tariff-queries.ts';
import { faultyDays, type TermDraft, termDrafts, termsOf } from './terms-draft.ts';
import { TermsEditor } from './terms-editor.tsx';
import { type TermsBody, useSaveTerms } from './use-save-terms.ts';

export type PadTermsEditorProps = {
  readonly padId: string;
  readonly padName: string;
  readonly tariffs: readonly TariffRow[];
  readonly today: string;
  readonly onClose: () => void;
};

/** The terms of one pad: the company's, or its own. */
export function PadTermsEditor(props: PadTermsEditorProps) {
  const { padId, padName, onClose } = props;
  const { data, isError, error, refetch } = useQuery(tariffQueries.padTerms(padId));
  return (
    <section
      aria-label={t('pad.title', { name: padName })}
      className="flex flex-col gap-3 border border-rule-strong p-4"
    >
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-semibold">{t('pad.title', { name: padName })}</h3>
        <Button onClick={onClose}>{t('pad.close')}</Button>
      </div>
      {data !== undefined ? (
        <Loaded key={padId} stored={data} {...props} />
      ) : isError ? (
        <ErrorNotice error={error} onRetry={() => void refetch()} />
      ) : (
        <div aria-busy="true" className="ruled h-32" />
      )}
    </section>
  );
}

type Draft = { readonly terms: readonly TermDraft[]; readonly ownMeter: boolean; readonly other: readonly string[] };

const draftOf = ({ terms, inherited, ownMeter, otherKwhByPeriod }: PadTerms): Draft => ({
  terms: inherited ? [] : termDrafts(terms),
  ownMeter,
  other: otherKwhByPeriod.map(String),
});

const kwhOf = (text: string): number => (text.trim() === '' ? 0 : Number(text.replaceAll(',', '')));
const isKwh = (text: string): boolean => kwhOf(text) >= 0 && kwhOf(text) <= 100_000;

function bodyOf({ terms, ownMeter, other }: Draft): TermsBody {
  const kwh = other.map(kwhOf);
  return { terms: termsOf(terms), ownMeter, otherKwhByPeriod: kwh.some((each) => each > 0) ? kwh : [] };
}

function Loaded({ padId, stored, tariffs, today }: PadTermsEditorProps & { readonly stored: PadTerms }) {
  const [changed, setChanged] = useState<Draft>();
  const save = useSaveTerms();
  const before = draftOf(stored);
  const draft = changed ?? before;
  const hasChanges = JSON.stringify(bodyOf(draft)) !== JSON.stringify(bodyOf(before));
  const isSound = faultyDays(draft.terms).size === 0 && draft.other.every(isKwh);
  const set = (part: Partial<Draft>) => setChanged({ ...draft, ...part });
  const periods = tariffs.find(({ id }) => id === draft.terms.at(-1)?.tariffId)?.tariff;
  return (
    <div className="flex flex-col gap-4">
      {draft.terms.length === 0 ? (
        <div className="flex flex-wrap items-center gap-3">
          <p>{t('pad.inherited')}</p>
          <Button
            disabled={tariffs.length === 0}
            onClick={() => set({ terms: [{ id: 1, tariffId: tariffs[0]?.id ?? '', day: today }] })}
          >
            {t('pad.own')}
          </Button>
        </div>
      ) : (
        <>
          <TermsEditor drafts={draft.terms} tariffs={tariffs} today={today} onChange={(terms) => set({ terms })} />
          <div>
            <Button onClick={() => set({ terms: [] })}>{t('pad.back')}</Button>
          </div>
          <label className="flex min-h-9 items-center gap-3">
            <input
              type="checkbox"
              className="size-5 shrink-0 accent-ink"
              checked={draft.ownMeter}
              onChange={() => set({ ownMeter: !draft.ownMeter })}
            />
            {t('pad.meter')}
          </label>
          {draft.ownMeter || periods === undefined ? null : (
            <fieldset className="flex flex-col gap-2">
              <legend className="font-medium">{t('pad.other')}</legend>
              <p className="text-13 text-ink-2">{t('pad.other.hint')}</p>
              <div className="grid gap-3 sm:grid-cols-3">
                {periods.energy.periods.map((_, index) => (
                  <Field
                    // biome-ignore lint/suspicious/noArrayIndexKey: a field is its period.
                    key={index}
                    label={periods.periodNames[index] || t('period.usual', { number: String(index + 1) })}
                    inputMode="decimal"
                    value={draft.other[index] ?? ''}
                    error={isKwh(draft.other[index] ?? '') ? undefined : t('pad.other.wrong')}
                    onChange={(event) =>
                      set({
                        other: periods.energy.periods.map((__, at) =>
                          at === index ? event.target.value : (draft.other[at] ?? ''),
                        ),
                      })
                    }
                  />
                ))}
              </div>
            </fieldset>
          )}
        </>
      )}
      {hasChanges ? (
        <SaveLine
          canSave={isSound}
          isSaving={save.isPending}
          onSave={() =>
            save.mutate(
              { padId, body: bodyOf(draft), before: bodyOf(before), version: stored.version },
              { onSuccess: () => setChanged(undefined) },
            )
          }
          onDiscard={() => setChanged(undefined)}
        />
      ) : null}
    </div>
  );
}
