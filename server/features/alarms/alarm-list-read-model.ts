import { type SQL, sql } from 'drizzle-orm';
import { likePattern } from '#server/db/like-pattern.ts';
import { isSetAside } from '#server/db/set-aside.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { SortKeys } from '#server/http/page-cursor.ts';
import type { AlarmPage, AlarmsQuery } from '#shared/contract/http/alarms.ts';
import { alarmColumns, alarmFrom, placeName } from './alarm-columns-read-model.ts';
import type { AlarmRow } from './alarm-row.ts';
import { isOf, speaksFor } from './whose-alarm-read-model.ts';

type Sort = AlarmsQuery['sort'];

/** A row with the keys it was sorted by. */
export type ListedAlarm = AlarmRow & { readonly keys: SortKeys };

const priorityRank = sql`case a.priority when 'urgent' then 0 when 'soon' then 1 else 2 end`;
const waitingRank = sql`case when a.state in ('unacknowledged', 'latched') then 0 when a.state = 'acknowledged' then 1 else 2 end`;
const raisedMs = sql`(extract(epoch from a.raised_at) * 1000)::float8`;

/** Every order is ascending in its keys, so that a place in the list is one row comparison. */
const SORT_KEYS: Readonly<Record<Sort, readonly SQL[]>> = {
  worst: [priorityRank, waitingRank, sql`-${raisedMs}`, sql`a.id::text`],
  newest: [sql`-${raisedMs}`, sql`a.id::text`],
  oldest: [raisedMs, sql`a.id::text`],
  name: [sql`lower(${placeName})`, priorityRank, sql`a.id::text`],
};

export const SORT_SHAPES: Readonly<Record<Sort, readonly ('number' | 'string')[]>> = {
  worst: ['number', 'number', 'number', 'string'],
  newest: ['number', 'string'],
  oldest: ['number', 'string'],
  name: ['string', 'number', 'string'],
};

const SHOWN: Readonly<Record<AlarmsQuery['show'], SQL>> = {
  open: sql`a.state <> 'normal' and not ${isSetAside}`,
  unacknowledged: sql`a.state in ('unacknowledged', 'returned', 'latched') and not ${isSetAside}`,
  shelved: sql`a.state <> 'normal' and a.shelved_until is not null`,
  suppressed: sql`a.state <> 'normal' and a.suppressed`,
  'out-of-service': sql`a.state <> 'normal' and a.out_of_service`,
  standing: sql`a.state <> 'normal'`,
  history: sql`a.state = 'normal'`,
  all: sql`true`,
};

function conditions(query: AlarmsQuery, userId: string): SQL {
  const all = [SHOWN[query.show]];
  if (query.alarmClass !== undefined) all.push(sql`a.alarm_class = ${query.alarmClass}`);
  if (query.priority !== undefined) all.push(sql`a.priority = ${query.priority}`);
  if (query.detector !== undefined) all.push(sql`a.detector = ${query.detector}`);
  if (query.pumpId !== undefined)
    all.push(sql`(a.pump_id = ${query.pumpId} or ${speaksFor(sql`m.pump_id = ${query.pumpId}`)})`);
  if (query.area !== undefined) all.push(sql`coalesce(pad.area, a.group_area) = ${query.area}`);
  if (query.whose === 'mine') all.push(isOf(sql`${userId}`));
  if (query.q !== undefined && query.q !== '') {
    const pattern = likePattern(query.q);
    all.push(
      sql`(${placeName} ilike ${pattern} or p.name ilike ${pattern} or pad.street ilike ${pattern} or customer.name ilike ${pattern})`,
    );
  }
  return sql.join(all, sql` and `);
}

/** One page of alarms and one row more, in the order asked for. */
export async function listAlarmRows(
  db: Transaction,
  query: AlarmsQuery,
  { after, userId }: { readonly after: SortKeys | undefined; readonly userId: string },
): Promise<ListedAlarm[]> {
  const keys = sql.join([...SORT_KEYS[query.sort]], sql`, `);
  const beyond =
    after === undefined
      ? sql``
      : sql` and (${keys}) > (${sql.join(
          after.map((key) => (typeof key === 'number' ? sql`${key}::float8` : sql`${key}::text`)),
          sql`, `,
        )})`;
  const { rows } = await db.execute<ListedAlarm>(sql`
    select ${alarmColumns}, json_build_array(${keys}) as keys from ${alarmFrom}
    where ${conditions(query, userId)}${beyond} order by ${keys} limit ${query.limit + 1}`);
  return rows;
}

/** How many open alarms by priority, and notes, the person may see; what was set aside is counted apart. */
export async function countOpenAlarms(db: Transaction): Promise<AlarmPage['totals']> {
  const { rows } = await db.execute<AlarmPage['totals']>(sql`
    select count(*) filter (where calls and priority = 'urgent')::int as urgent,
      count(*) filter (where calls and priority = 'soon')::int as soon,
      count(*) filter (where not set_aside and (alarm_class = 'note' or priority = 'note'))::int as note,
      count(*) filter (where calls and state in ('unacknowledged', 'returned', 'latched'))::int as unacknowledged,
      count(*) filter (where shelved_until is not null)::int as shelved,
      count(*) filter (where suppressed)::int as suppressed,
      count(*) filter (where out_of_service)::int as "outOfService"
    from (select a.*, ${isSetAside} as set_aside, a.alarm_class = 'alarm' and not ${isSetAside} as calls
      from alarms a where a.state <> 'normal') open`);
  return rows[0] ?? { urgent: 0, soon: 0, note: 0, unacknowledged: 0, shelved: 0, suppressed: 0, outOfService: 0 };
}
