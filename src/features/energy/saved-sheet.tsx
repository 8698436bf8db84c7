import { Sheet } from '#src/components/ui/sheet.tsx';
import { t } from '#src/lib/messages/energy-words.ts';
import { SavedFacts, type SavedFactsProps } from './saved-facts.tsx';

/** What was saved, on a sheet of its own. */
export function SavedSheet(props: SavedFactsProps) {
  return (
    <Sheet id="saved" title={t('energy.saved.title')}>
      <div className="px-4 py-3 sm:px-5">
        <SavedFacts {...props} />
      </div>
    </Sheet>
  );
}
