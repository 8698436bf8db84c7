import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';

export type SaveLineProps = {
  readonly canSave: boolean;
  readonly isSaving: boolean;
  readonly onSave: () => void;
  readonly onDiscard: () => void;
};

/** Save or discard what was changed on one sheet. */
export const SaveLine = ({ canSave, isSaving, onSave, onDiscard }: SaveLineProps) => (
  <div className="flex flex-wrap items-center gap-3 border-t border-rule pt-3">
    <p role="status" className="font-semibold">
      {t('tariff.unsaved')}
    </p>
    <Button look="main" disabled={isSaving || !canSave} onClick={onSave}>
      {isSaving ? t('tariff.saving') : t('tariff.save')}
    </Button>
    <Button disabled={isSaving} onClick={onDiscard}>
      {t('tariff.discard')}
    </Button>
  </div>
);
