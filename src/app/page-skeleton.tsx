import { t } from '#src/lib/messages/t.ts';

/** Before anything is known, not even who is asking: paper with its ruling, no ink. */
export function PageSkeleton() {
  return (
    <div className="px-4 py-8 sm:px-7">
      <p role="status" className="sr-only">
        {t('shell.loading')}
      </p>
      <div aria-hidden="true" className="ruled mt-12 h-96 border border-ink bg-sheet" />
    </div>
  );
}
