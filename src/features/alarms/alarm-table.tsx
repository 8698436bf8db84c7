import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { listAlarmColumns } from './alarm-columns.ts';

export type AlarmTableProps = { readonly alarms: readonly Alarm[]; readonly now: number };

/** The list as a table: the same rows in the same order, figure by figure. */
export function AlarmTable({ alarms, now }: AlarmTableProps) {
  const format = useFormat();
  const columns = listAlarmColumns().map(({ head, figures, value, shown = value }, index) => ({
    head,
    ...(figures === undefined ? {} : { figures }),
    cell: (alarm: Alarm) => {
      const told = shown(alarm, { format, now });
      const text = told === null || told === '' ? '–' : told;
      if (index !== TITLE_COLUMN) return text;
      return (
        <Link to={paths.alarm(alarm.id)} className="underline underline-offset-2">
          {text}
        </Link>
      );
    },
  }));
  return (
    <div className="px-4 py-2 sm:px-5">
      <DataTable caption={t('alarms.table')} columns={columns} rows={alarms} keyOf={({ id }) => id} wide />
    </div>
  );
}

const TITLE_COLUMN = 1;
