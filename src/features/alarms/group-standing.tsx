import type { AlarmGroup } from '#shared/contract/http/alarms.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** How many of the pumps that an alarm speaks for are still concerned: a bar and its words. */
export function GroupStanding({ group }: { readonly group: AlarmGroup }) {
  const { standing, pumps } = group;
  const share = pumps === 0 ? 0 : Math.min(1, standing / pumps);
  return (
    <div>
      <div aria-hidden="true" className="flex h-3 w-full border border-ink">
        <div className="bg-ink" style={{ width: `${share * 100}%` }} />
      </div>
      <p className="figures pt-1 text-13 text-ink-2">
        {standing === 0 ? t('group.over', { count: pumps }) : t('group.standing', { count: standing, pumps })}
      </p>
    </div>
  );
}
