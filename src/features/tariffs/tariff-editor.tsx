import { useQuery } from '@tanstack/react-query';
import { useMemo, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { TariffRow, TariffShape } from '#shared/contract/http/tariffs.ts';
import { Notice } from '#src/components/ui/notice.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { useSettled } from '#src/hooks/use-settled.ts';
import { isApiError } from '#src/lib/api/api-error.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { localToday } from '#src/lib/local-today.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { paths } from '#src/lib/paths.ts';
import { placeOfFault } from './place-of-fault.ts';
import { shapeOfDraft } from './shape-of-draft.ts';
import { draftOf, newDraft, type TariffDraft } from './tariff-draft.ts';
import { collectFaults, refusalsOf } from './tariff-faults.ts';
import { TariffForm } from './tariff-form.tsx';
import { tariffQueries } from './tariff-queries.ts';
import { TariffSaveBar } from './tariff-save-bar.tsx';
import { useLeaveGuard } from './use-leave-guard.tsx';
import { useSaveTariff } from './use-save-tariff.ts';
import { useStepBack } from './use-step-back.ts';
import { usersText } from './users-text.ts';

export type TariffEditorProps = {
  /** What is edited; without it a new one, made from `from` where that is given. */
  readonly row: TariffRow | undefined;
  readonly from?: TariffShape | undefined;
  readonly currency: string;
};

const CHECK_AFTER_MS = 400;

/** A tariff as a form: changed, checked while it is written, saved. What was typed stays when somebody else saves meanwhile. */
export function TariffEditor({ row, from, currency }: TariffEditorProps) {
  const format = useFormat();
  const navigate = useNavigate();
  const isSaved = useRef(false);
  const [takenName, setTakenName] = useState<string>();
  const stored = useMemo(
    () => (row !== undefined ? draftOf(row.tariff) : from !== undefined ? draftOf(from) : newDraft(currency)),
    [row, from, currency],
  );
  const { company } = useSession();
  const terms = useQuery({ ...tariffQueries.companyTerms(), enabled: row?.isCompanys === true });
  const steps = useStepBack<TariffDraft>();
  const draft = steps.value ?? stored;
  const hasChanges = row === undefined ? steps.value !== undefined || from !== undefined : isOther(draft, stored);
  const outcome = useMemo(() => shapeOfDraft(draft), [draft]);
  const settled = useSettled(outcome.shape, CHECK_AFTER_MS);
  const check = useQuery(tariffQueries.check(settled));
  const save = useSaveTariff();
  const told = outcome.shape === undefined ? [] : (refusalsOf(save.error) ?? check.data?.faults ?? []);
  const faults = new Map(collectFaults(draft, outcome, told, format));
  if (takenName !== undefined && takenName === draft.name.trim()) faults.set('name', t('fault.name-taken'));
  const guard = useLeaveGuard(hasChanges, () => isSaved.current);

  const onSave = (shape: TariffShape) =>
    save.mutate(
      { before: row, shape },
      {
        onSuccess: (saved) => {
          steps.clear();
          if (row !== undefined) return;
          isSaved.current = true;
          void navigate(paths.tariff(saved.id), { replace: true });
        },
        onError: (error) => {
          if (isApiError(error, 'conflict')) setTakenName(shape.name);
        },
      },
    );
  return (
    <>
      {row === undefined || !isUsed(row) || terms.isLoading ? null : (
        <div className="border border-ink bg-sheet">
          <Notice
            title={t('tariff.inUse', {
              users: usersText(row, { terms: terms.data?.terms ?? [], today: localToday(company.zone) }, format),
            })}
          >
            {t('tariff.inUse.advice')}
          </Notice>
        </div>
      )}
      <TariffForm
        draft={draft}
        faults={faults}
        readOnly={save.isPending}
        onChange={(next, key) => {
          save.reset();
          steps.change(next, key);
        }}
      />
      <TariffSaveBar
        hasChanges={hasChanges}
        faults={[...faults].map(([field, fault]) => [field, placeOfFault(field, fault, draft)])}
        check={
          outcome.shape === undefined || settled !== outcome.shape || check.isFetching
            ? 'checking'
            : check.isError
              ? { failed: describeError(check.error).title }
              : 'checked'
        }
        isSaving={save.isPending}
        onSave={outcome.shape === undefined ? undefined : () => onSave(outcome.shape)}
        onStepBack={steps.canStepBack ? steps.stepBack : undefined}
        onDiscard={steps.value === undefined ? undefined : steps.clear}
      />
      {guard}
    </>
  );
}

const isUsed = ({ pads, isCompanys }: TariffRow): boolean => isCompanys || pads > 0;

/** A name in other capitals is a change, an order of fields none: drafts are made by one function. */
const isOther = (one: TariffDraft, other: TariffDraft): boolean => JSON.stringify(one) !== JSON.stringify(other);
