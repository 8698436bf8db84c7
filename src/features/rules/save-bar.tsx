import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/rules-words.ts';

export type SaveBarProps = {
  readonly changes: number;
  readonly isSaving: boolean;
  readonly canSave: boolean;
  readonly onSave: () => void;
  readonly onDiscard: () => void;
};

/** What is not saved yet, in sight wherever one has scrolled to. */
export function SaveBar({ changes, isSaving, canSave, onSave, onDiscard }: SaveBarProps) {
  if (changes === 0) return null;
  return (
    <div className="sticky bottom-0 z-10 flex flex-wrap items-center gap-3 border border-ink bg-sheet px-4 py-3">
      <p role="status" className="font-semibold">
        {t('rules.unsaved', { count: changes })}
      </p>
      <Button look="main" disabled={isSaving || !canSave} onClick={onSave}>
        {isSaving ? t('rules.saving') : t('rules.save')}
      </Button>
      <Button disabled={isSaving} onClick={onDiscard}>
        {t('rules.discard')}
      </Button>
    </div>
  );
}
