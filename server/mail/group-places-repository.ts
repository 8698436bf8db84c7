import type pg from 'pg';
import type { MailHours } from '#server/db/schema/companies.ts';
import type { AreaKind } from '#shared/domain/fold/area/area-signal.ts';
import type { MailPerson, MailPlace } from './mail-place.ts';

type PersonRow = { readonly id: string; readonly name: string; readonly email: string };

type Row = {
  readonly alarm_id: string;
  readonly kind: AreaKind;
  readonly area: string | null;
  readonly company_id: string;
  readonly company_name: string;
  readonly company_zone: string;
  readonly mail_hours: MailHours;
  readonly pads: number;
  readonly pumps: number;
  readonly technicians: readonly (PersonRow | null)[];
  readonly managers: readonly PersonRow[];
};

const SELECT = `select a.id as alarm_id, a.group_kind as kind, a.group_area as area, c.id as company_id, c.name as company_name,
  c.zone as company_zone, c.mail_hours, coalesce(m.pads, 0) as pads, coalesce(m.pumps, 0) as pumps,
  coalesce(m.technicians, '[]') as technicians,
  (select coalesce(json_agg(json_build_object('id', u.id, 'name', u.name, 'email', u.email) order by u.created_at), '[]')
    from users u where u.company_id = c.id and u.role = 'manager' and u.disabled_at is null) as managers
from alarms a join companies c on c.id = a.company_id
left join lateral (
  select count(distinct pad.id)::int as pads, count(*)::int as pumps,
    jsonb_agg(distinct case when t.id is not null then jsonb_build_object('id', t.id, 'name', t.name, 'email', t.email) end) as technicians
  from alarm_members member join pumps p on p.id = member.pump_id join pads pad on pad.id = p.pad_id
  left join users t on t.id = pad.technician_id and t.disabled_at is null
  where member.alarm_id = a.id) m on true
where a.id = any($1::uuid[]) and a.group_key is not null`;

const toPerson = ({ id, name, email }: PersonRow): MailPerson => ({ userId: id, name, address: email });

/** Where alarms that speak for several pumps are, and who answers for them, by the alarm's id. */
export async function listGroupPlaces(
  database: Pick<pg.ClientBase, 'query'>,
  alarmIds: readonly string[],
): Promise<Map<string, MailPlace>> {
  if (alarmIds.length === 0) return new Map();
  const { rows } = await database.query<Row>(SELECT, [alarmIds]);
  return new Map(rows.map((row) => [row.alarm_id, toPlace(row)]));
}

/** To the technician who has all of the pads; to the managers where several do, and about our own link in any case. */
function toPlace(row: Row): MailPlace {
  const [only, ...others] = row.technicians;
  const isOnes = row.kind !== 'own-link' && others.length === 0 && only !== undefined && only !== null;
  const place = row.area ?? row.company_name;
  return {
    companyId: row.company_id,
    companyName: row.company_name,
    companyZone: row.company_zone,
    mailHours: row.mail_hours,
    // The policy remembers such an alarm as a pad of its own.
    padId: row.alarm_id,
    padName: place,
    street: place,
    town: undefined,
    area: undefined,
    zone: row.company_zone,
    pumpName: `${count(row.pumps, 'pump')} on ${count(row.pads, 'pad')}`,
    customerName: undefined,
    technician: isOnes ? toPerson(only) : undefined,
    managers: row.managers.map(toPerson),
  };
}

const count = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? '' : 's'}`;
