import { useQuery } from '@tanstack/react-query';
import { alarmQueries } from '#src/features/alarms/alarm-queries.ts';
import { t } from '#src/lib/messages/t.ts';

/** How many alarms nobody has acknowledged, beside the page's name; nothing when there are none. */
export function AlarmCount() {
  const { data } = useQuery(alarmQueries.totals());
  if (data === undefined || data.totals.unacknowledged === 0) return null;
  const ground = data.totals.urgent > 0 ? 'bg-p1' : 'bg-ink';
  return (
    <span className={`figures ml-2 rounded-control px-1.5 text-13 font-semibold text-sheet ${ground}`}>
      <span aria-hidden="true">{data.totals.unacknowledged}</span>
      <span className="sr-only">{t('shell.unacknowledged', { count: data.totals.unacknowledged })}</span>
    </span>
  );
}
