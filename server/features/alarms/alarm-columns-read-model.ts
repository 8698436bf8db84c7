import { sql } from 'drizzle-orm';

/** Columns of AlarmRow. Names of people the reader may not see come back null: row-level security hides their rows. */
export const alarmColumns = sql`
  a.id, a.pump_id as "pumpId", a.pad_id as "padId", pad.name as "padName", p.name as "pumpName",
  customer.name as "customerName", pad.area, pad.zone, a.record, seen.name as "acknowledgedByName",
  shelver.name as "shelvedByName", assignee.name as "assigneeName", technician.name as "technicianName",
  answerer.name as "answeredByName", worker.name as "doneByName", stopper.name as "outOfServiceByName",
  pad.stop_weekday as "stopWeekday", a.version`;

/** The customer is whoever owns the pad now. */
export const alarmFrom = sql`alarms a
  join pumps p on p.id = a.pump_id
  join pads pad on pad.id = a.pad_id
  left join pad_ownerships owner on owner.pad_id = pad.id and owner.starts_at <= now() and (owner.ends_at is null or owner.ends_at > now())
  left join customers customer on customer.id = owner.customer_id
  left join users technician on technician.id = pad.technician_id
  left join users seen on seen.id = a.acknowledged_by
  left join users shelver on shelver.id = a.shelved_by
  left join users assignee on assignee.id = a.assigned_to
  left join users answerer on answerer.id = (a.record -> 'answer' ->> 'by')::uuid
  left join users worker on worker.id = (a.record -> 'done' ->> 'by')::uuid
  left join users stopper on stopper.id = (a.record -> 'outOfService' ->> 'by')::uuid`;
