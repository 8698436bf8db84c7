import { type Alarm, alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { call } from '#src/lib/api/api-client.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import { listAlarmColumns } from './alarm-columns.ts';
import type { AlarmFilter } from './alarm-queries.ts';

const PAGE = 200;

/** Every alarm and note of a list, not only those that have been read for the screen. */
async function readAll(filter: AlarmFilter): Promise<readonly Alarm[]> {
  const alarms: Alarm[] = [];
  let cursor: string | undefined;
  do {
    const page = await call(alarmEndpoints.list, {
      query: { ...filter, limit: PAGE, ...(cursor === undefined ? {} : { cursor }) },
    });
    alarms.push(...page.items);
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
  return alarms;
}

/** Saves what the list is narrowed to as a file. */
export function ExportAlarms({ filter }: { readonly filter: AlarmFilter }) {
  const format = useFormat();
  const rows = async () => {
    const now = serverNow();
    const columns = listAlarmColumns();
    const alarms = await readAll(filter);
    return [
      columns.map(({ head }) => head),
      ...alarms.map((alarm) => columns.map(({ value }) => value(alarm, { format, now }))),
    ];
  };
  return <ExportButton name={`alarms-${new Date(serverNow()).toISOString().slice(0, 10)}`} rows={rows} />;
}
