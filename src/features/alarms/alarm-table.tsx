import { Link } from 'react-router-dom';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { listAlarmColumns } from './alarm-columns.ts';
import { titleOf } from './alarm-names.ts';

export type AlarmTableProps = { readonly alarms: readonly Alarm[]; readonly now: number };

const isSaid = (told: string | number | null): told is string | number => told !== null && told !== '';

/** The list as a table: the same rows in the same order, figure by figure. A column in which nothing stands is left out. */
export function AlarmTable({ alarms, now }: AlarmTableProps) {
  const format = useFormat();
  const told = { format, now };
  const columns = listAlarmColumns()
    .filter(({ value }) => alarms.some((alarm) => isSaid(value(alarm, told))))
    .map(({ head, figures, value, shown = value }) => ({
      head,
      ...(figures === undefined ? {} : { figures }),
      cell: (alarm: Alarm) => {
        const text = shown(alarm, told);
        if (value !== titleOf) return isSaid(text) ? text : '–';
        return (
          <Link to={paths.alarm(alarm.id)} className="inline-block min-w-52 underline underline-offset-2">
            {text}
          </Link>
        );
      },
    }));
  return (
    <div className="px-4 py-2 sm:px-5">
      <DataTable caption={t('alarms.table')} columns={columns} rows={alarms} keyOf={({ id }) => id} wide="very" />
    </div>
  );
}
