import { sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';
import type { AlarmMember } from '#shared/contract/http/alarms.ts';

/** The pumps an alarm speaks for: those of which something stands first, then by pad. */
export async function listMembers(db: Transaction, alarmId: string): Promise<AlarmMember[]> {
  const { rows } = await db.execute<AlarmMember>(sql`
    select m.pump_id as "pumpId", p.name as "pumpName", p.pad_id as "padId", pad.name as "padName", pad.area,
      round(extract(epoch from m.joined_at) * 1000)::float8 as "joinedAt",
      round(extract(epoch from m.left_at) * 1000)::float8 as "leftAt",
      (select own.id from alarms own where own.pump_id = m.pump_id and own.covered_by = m.alarm_id
        order by own.raised_at desc limit 1) as "alarmId"
    from alarm_members m join pumps p on p.id = m.pump_id join pads pad on pad.id = p.pad_id
    where m.alarm_id = ${alarmId}
    order by m.left_at is not null, lower(pad.name), p.name`);
  return rows;
}
