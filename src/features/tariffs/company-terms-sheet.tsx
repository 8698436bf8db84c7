import { useState } from 'react';
import type { CompanyTerms, TariffRow } from '#shared/contract/http/tariffs.ts';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { SaveLine } from './save-line.tsx';
import { faultyDays, isSameTerms, type TermDraft, termDrafts, termsOf } from './terms-draft.ts';
import { TermsEditor } from './terms-editor.tsx';
import { useLeaveGuard } from './use-leave-guard.tsx';
import { useSaveTerms } from './use-save-terms.ts';

export type CompanyTermsSheetProps = {
  readonly stored: CompanyTerms;
  readonly tariffs: readonly TariffRow[];
  readonly today: string;
};

const ALONE = { ownMeter: false, otherKwhByPeriod: [] };

/** Which tariff holds when for every pad without terms of its own. */
export function CompanyTermsSheet({ stored, tariffs, today }: CompanyTermsSheetProps) {
  const [changed, setChanged] = useState<readonly TermDraft[]>();
  const save = useSaveTerms();
  const before = termDrafts(stored.terms);
  const drafts = changed ?? before;
  const hasChanges = !isSameTerms(drafts, before);
  const guard = useLeaveGuard(hasChanges, () => false);
  const onSave = () =>
    save.mutate(
      {
        padId: undefined,
        body: { terms: termsOf(drafts), ...ALONE },
        before: { terms: stored.terms, ...ALONE },
        version: stored.version,
      },
      { onSuccess: () => setChanged(undefined) },
    );
  return (
    <Sheet id="company-terms" title={t('terms.company')}>
      <div className="flex flex-col gap-4 px-4 py-4 sm:px-5">
        <p className="max-w-prose text-ink-2">{t('terms.company.lead')}</p>
        <TermsEditor drafts={drafts} tariffs={tariffs} today={today} onChange={setChanged} />
        {hasChanges ? (
          <SaveLine
            canSave={faultyDays(drafts).size === 0}
            isSaving={save.isPending}
            onSave={onSave}
            onDiscard={() => setChanged(undefined)}
          />
        ) : null}
      </div>
      {guard}
    </Sheet>
  );
}
