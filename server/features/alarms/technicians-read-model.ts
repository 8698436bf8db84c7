import { sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { isSetAside } from '#server/db/set-aside.ts';
import { invalid } from '#server/errors.ts';
import type { Technicians } from '#shared/contract/http/alarm-acts.ts';
import { isOf } from './whose-alarm-read-model.ts';

/** Technicians of the company who have not left, each with the open alarms that go to them; by name. */
export async function listTechnicianRows({ db, actor }: Context): Promise<Technicians['items']> {
  const { rows } = await db.execute<Technicians['items'][number]>(sql`
    select u.id, u.name, (select count(*) from alarms a left join pads pad on pad.id = a.pad_id
      where a.state <> 'normal' and a.alarm_class = 'alarm' and not ${isSetAside} and ${isOf(sql`u.id`)})::int as "openAlarms"
    from users u where u.company_id = ${actor.companyId} and u.role = 'technician' and u.disabled_at is null
    order by u.name, u.id`);
  return rows;
}

/** A technician whom an alarm may be given to; anybody else is refused by name. */
export async function getTechnician({ db, actor }: Context, userId: string): Promise<{ readonly name: string }> {
  const { rows } = await db.execute<{ name: string }>(sql`
    select name from users where company_id = ${actor.companyId} and id = ${userId} and role = 'technician'
      and disabled_at is null`);
  if (rows[0] === undefined) throw invalid('body.technicianId', 'is no technician of this company');
  return rows[0];
}
