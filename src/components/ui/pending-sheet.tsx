import { t } from '#src/lib/messages/t.ts';
import { ErrorNotice } from './error-notice.tsx';

export type PendingSheetProps = {
  /** Why there is nothing to show; undefined while it is still loading. */
  readonly error: unknown;
  readonly onRetry: () => void;
};

/** The sheet of a page whose data is not there: still loading, or why it did not come. */
export function PendingSheet({ error, onRetry }: PendingSheetProps) {
  if (error !== undefined) {
    return (
      <div className="border border-ink bg-sheet">
        <ErrorNotice error={error} onRetry={onRetry} />
      </div>
    );
  }
  return (
    <div aria-busy="true" className="border border-ink bg-sheet p-4">
      <p role="status" className="sr-only">
        {t('shell.loading')}
      </p>
      <div aria-hidden="true" className="ruled h-96" />
    </div>
  );
}
