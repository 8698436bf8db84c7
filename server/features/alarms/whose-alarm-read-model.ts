import { type SQL, sql } from 'drizzle-orm';

/** An alarm `a` without a pump of its own that speaks for such a pump. */
export const speaksFor = (which: SQL) =>
  sql`(a.pump_id is null and exists (select from alarm_members m join pumps mp on mp.id = m.pump_id
    join pads mpad on mpad.id = mp.pad_id where m.alarm_id = a.id and ${which}))`;

/** Alarms `a`, with their `pad`, that go to a technician: given to them, of their pads, or speaking for one of these. */
export const isOf = (userId: SQL) =>
  sql`(coalesce(a.assigned_to, pad.technician_id) = ${userId}
    or a.assigned_to is null and ${speaksFor(sql`mpad.technician_id = ${userId}`)})`;
