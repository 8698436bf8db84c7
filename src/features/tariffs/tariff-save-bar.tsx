import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';

export type TariffSaveBarProps = {
  readonly hasChanges: boolean;
  /** By field. */
  readonly faults: readonly (readonly [field: string, said: string])[];
  readonly check: 'checking' | 'checked' | { readonly failed: string };
  readonly isSaving: boolean;
  /** undefined = it cannot be asked for as it stands. */
  readonly onSave: (() => void) | undefined;
  readonly onStepBack: (() => void) | undefined;
  readonly onDiscard: (() => void) | undefined;
};

const SHOWN = 3;

/** What keeps a tariff from being saved, and the way to save it or back, in sight wherever one has scrolled to. */
export function TariffSaveBar({ hasChanges, faults, check, isSaving, onSave, ...acts }: TariffSaveBarProps) {
  if (!hasChanges) return null;
  return (
    <div className="sticky bottom-0 z-10 flex flex-col gap-2 border border-ink bg-sheet px-4 py-3">
      <div role="status">
        {faults.length > 0 ? (
          <>
            <p className="font-semibold">{t('tariff.faults', { count: faults.length })}</p>
            <ul className="text-13">
              {faults.slice(0, SHOWN).map(([field, said]) => (
                <li key={field}>{said}</li>
              ))}
              {faults.length > SHOWN ? <li>{t('tariff.faults.more', { count: faults.length - SHOWN })}</li> : null}
            </ul>
          </>
        ) : (
          <p className="text-13 text-ink-2">
            {check === 'checking'
              ? t('tariff.checking')
              : check === 'checked'
                ? t('tariff.sound')
                : t('tariff.unchecked', { reason: check.failed })}
          </p>
        )}
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <p className="font-semibold">{t('tariff.unsaved')}</p>
        <Button look="main" disabled={isSaving || onSave === undefined || faults.length > 0} onClick={onSave}>
          {isSaving ? t('tariff.saving') : t('tariff.save')}
        </Button>
        <Button disabled={isSaving || acts.onStepBack === undefined} onClick={acts.onStepBack}>
          {t('tariff.undoStep')}
        </Button>
        <Button disabled={isSaving || acts.onDiscard === undefined} onClick={acts.onDiscard}>
          {t('tariff.discard')}
        </Button>
      </div>
    </div>
  );
}
