import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Button } from '#src/components/ui/button.tsx';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { ActButtons } from './act-buttons.tsx';
import { isWaiting } from './alarm-view.ts';
import { listOfferedForAll } from './offered-acts.ts';
import { useActs } from './use-acts.ts';

export type BulkBarProps = { readonly selected: readonly Alarm[]; readonly onClear: () => void };

/** What is done to several alarms at once. It stays in sight while one goes on selecting. */
export function BulkBar({ selected, onClear }: BulkBarProps) {
  const { user } = useSession();
  const acts = useActs();
  if (selected.length === 0) return null;
  const waiting = selected.filter(isWaiting);
  return (
    <section
      aria-label={t('alarms.bulk')}
      data-print="never"
      className="sticky top-0 z-20 flex flex-wrap items-center gap-2 border-b border-ink bg-sheet px-4 py-2 sm:px-5"
    >
      <p role="status" className="mr-2 font-semibold">
        {t('alarms.selected', { count: selected.length })}
      </p>
      {waiting.length === 0 ? null : (
        <Button
          look="main"
          onClick={() => {
            acts.mutate({ alarms: waiting, act: { kind: 'acknowledge' } });
            onClear();
          }}
        >
          {t('act.acknowledge')}
        </Button>
      )}
      <ActButtons alarms={selected} kinds={listOfferedForAll(selected, user.role)} onDone={onClear} />
      <Button look="quiet" onClick={onClear}>
        {t('alarms.clearSelection')}
      </Button>
    </section>
  );
}
