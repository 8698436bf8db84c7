import { useId } from 'react';
import type { TariffRow } from '#shared/contract/http/tariffs.ts';
import { Button } from '#src/components/ui/button.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { addTerm, faultyDays, type TermDraft } from './terms-draft.ts';

export type TermsEditorProps = {
  readonly drafts: readonly TermDraft[];
  readonly tariffs: readonly TariffRow[];
  /** The local day it is now, `2026-12-01`. */
  readonly today: string;
  readonly onChange: (drafts: readonly TermDraft[]) => void;
};

const INPUT = 'min-h-9 min-w-0 max-w-full rounded-control border border-ink-2 bg-sheet px-2 aria-invalid:border-p1';

/** From which day which tariff holds. An end is the beginning of the next, so that no day is left without. */
export function TermsEditor({ drafts, tariffs, today, onChange }: TermsEditorProps) {
  const faults = faultyDays(drafts);
  const replace = (id: number, part: Partial<TermDraft>) =>
    onChange(drafts.map((draft) => (draft.id === id ? { ...draft, ...part } : draft)));
  const ids = tariffs.map(({ id }) => id);
  return (
    <div className="flex flex-col gap-3">
      {drafts.length === 0 ? <p>{t('terms.none')}</p> : null}
      <ol className="flex flex-col gap-3">
        {drafts.map((draft, index) => (
          <TermRow
            key={draft.id}
            draft={draft}
            number={index + 1}
            before={drafts[index - 1]?.day}
            until={drafts[index + 1]?.day}
            tariffs={tariffs}
            fault={faults.get(draft.id)}
            onChange={(part) => replace(draft.id, part)}
            onRemove={() => onChange(drafts.filter(({ id }) => id !== draft.id))}
          />
        ))}
      </ol>
      <div>
        <Button disabled={ids.length === 0} onClick={() => onChange(addTerm(drafts, ids, today))}>
          {t(drafts.length === 0 ? 'terms.addFirst' : 'terms.add')}
        </Button>
        {ids.length === 0 ? <span className="ml-3 text-ink-2">{t('terms.noTariffs')}</span> : null}
      </div>
    </div>
  );
}

type TermRowProps = {
  readonly draft: TermDraft;
  readonly number: number;
  readonly before: string | undefined;
  readonly until: string | undefined;
  readonly tariffs: readonly TariffRow[];
  readonly fault: 'day' | 'order' | undefined;
  readonly onChange: (part: Partial<TermDraft>) => void;
  readonly onRemove: () => void;
};

function TermRow({ draft, number, before = '', until, tariffs, fault, onChange, onRemove }: TermRowProps) {
  const id = useId();
  const format = useFormat();
  const dayText = (day: string) => (day === '' ? '–' : format.dayWithYear(Date.parse(`${day}T12:00:00Z`), 'UTC'));
  const name = tariffs.find((row) => row.id === draft.tariffId)?.tariff.name ?? '';
  return (
    <li className="flex flex-col gap-1">
      <fieldset className="flex flex-wrap items-center gap-x-3 gap-y-2">
        <legend className="sr-only">{t('terms.row', { number: String(number) })}</legend>
        <select
          aria-label={t('terms.tariff')}
          value={draft.tariffId}
          onChange={(event) => onChange({ tariffId: event.target.value })}
          className={INPUT}
        >
          {tariffs.map(({ id: tariffId, tariff }) => (
            <option key={tariffId} value={tariffId}>
              {tariff.name}
            </option>
          ))}
        </select>
        <label htmlFor={id} className="text-ink-2">
          {t('terms.from').toLowerCase()}
        </label>
        <input
          id={id}
          type="date"
          value={draft.day}
          aria-invalid={fault === undefined ? undefined : true}
          aria-describedby={fault === undefined ? undefined : `${id}-fault`}
          onChange={(event) => onChange({ day: event.target.value })}
          className={`figures ${INPUT}`}
        />
        <span className="text-ink-2">
          {until === undefined ? t('terms.open') : t('terms.until', { day: dayText(until) })}
        </span>
        <Button look="quiet" aria-label={t('terms.removeNamed', { name, day: dayText(draft.day) })} onClick={onRemove}>
          {t('terms.remove')}
        </Button>
      </fieldset>
      {fault === undefined ? null : (
        <p id={`${id}-fault`} className="text-13 font-medium text-p1">
          {fault === 'day' ? t('terms.fault.day') : t('terms.fault.order', { day: dayText(before) })}
        </p>
      )}
    </li>
  );
}
