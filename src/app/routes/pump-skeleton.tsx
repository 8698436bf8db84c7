import { t } from '#src/lib/messages/t.ts';

/** A pump's page before its first data: ruled paper without ink. */
export function PumpSkeleton() {
  return (
    <div aria-busy="true" className="mt-4 border border-ink bg-sheet px-5 py-5">
      <p role="status" className="sr-only">
        {t('shell.loading')}
      </p>
      <div aria-hidden="true" className="ruled ml-14 h-50" />
    </div>
  );
}
