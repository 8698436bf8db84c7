import { sql } from 'drizzle-orm';

/** The pad, or where an alarm is that speaks for several: its area, or all that the company watches. */
export const placeName = sql`coalesce(pad.name, a.group_area, company.name)`;

/** Columns of AlarmRow. Names of people the reader may not see come back null: row-level security hides their rows. */
export const alarmColumns = sql`
  a.id, a.pump_id as "pumpId", a.pad_id as "padId", ${placeName} as "padName", coalesce(p.name, '') as "pumpName",
  customer.name as "customerName", coalesce(pad.area, a.group_area) as area, coalesce(pad.zone, company.zone) as zone,
  a.group_kind as "groupKind", a.group_area as "groupArea", a.covered_by as "coveredBy", a.record, seen.name as "acknowledgedByName",
  shelver.name as "shelvedByName", assignee.name as "assigneeName", technician.name as "technicianName",
  answerer.name as "answeredByName", worker.name as "doneByName", stopper.name as "outOfServiceByName",
  pad.stop_weekday as "stopWeekday", a.version`;

/** The customer is whoever owns the pad now. */
export const alarmFrom = sql`alarms a
  join companies company on company.id = a.company_id
  left join pumps p on p.id = a.pump_id
  left join pads pad on pad.id = a.pad_id
  left join pad_ownerships owner on owner.pad_id = pad.id and owner.starts_at <= now() and (owner.ends_at is null or owner.ends_at > now())
  left join customers customer on customer.id = owner.customer_id
  left join users technician on technician.id = pad.technician_id
  left join users seen on seen.id = a.acknowledged_by
  left join users shelver on shelver.id = a.shelved_by
  left join users assignee on assignee.id = a.assigned_to
  left join users answerer on answerer.id = (a.record -> 'answer' ->> 'by')::uuid
  left join users worker on worker.id = (a.record -> 'done' ->> 'by')::uuid
  left join users stopper on stopper.id = (a.record -> 'outOfService' ->> 'by')::uuid`;
