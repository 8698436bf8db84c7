import type { Context } from '#server/context.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import type { AlarmPage, AlarmsQuery } from '#shared/contract/http/alarms.ts';
import { countOpenAlarms, listAlarmRows, SORT_SHAPES } from './alarm-list-read-model.ts';
import { presentAlarm } from './present-alarm.ts';

/** One page of the alarms the person may see. */
export async function listAlarms({ db, actor, now }: Context, query: AlarmsQuery): Promise<AlarmPage> {
  const after = decodeCursor(query.cursor, SORT_SHAPES[query.sort]);
  const rows = await listAlarmRows(db, query, { after, userId: actor.userId });
  const page = toPage(rows, query.limit, (row) => row.keys);
  return {
    items: page.items.map((row) => presentAlarm(row, actor, now)),
    nextCursor: page.nextCursor,
    totals: await countOpenAlarms(db),
    serverNow: now,
  };
}
