import type pg from 'pg';
import type { MailHours } from '#server/db/schema/companies.ts';
import type { MailPerson, MailPlace } from './mail-place.ts';

type PersonRow = { readonly id: string; readonly name: string; readonly email: string };

type Row = {
  readonly pump_id: string;
  readonly company_id: string;
  readonly company_name: string;
  readonly company_zone: string;
  readonly mail_hours: MailHours;
  readonly pad_id: string;
  readonly pad_name: string;
  readonly street: string;
  readonly town: string | null;
  readonly area: string | null;
  readonly zone: string;
  readonly pump_name: string;
  readonly customer_name: string | null;
  readonly technician: PersonRow | null;
  readonly managers: readonly PersonRow[];
};

/* Access notes are left out on purpose: a gate's code has no business in a mailbox. */
const SELECT = `select p.id as pump_id, c.id as company_id, c.name as company_name, c.zone as company_zone, c.mail_hours,
  pad.id as pad_id, pad.name as pad_name, pad.street, pad.town, pad.area, pad.zone, p.name as pump_name,
  (select cu.name from pad_ownerships o join customers cu on cu.id = o.customer_id
    where o.pad_id = pad.id and o.starts_at <= now() and (o.ends_at is null or o.ends_at > now())) as customer_name,
  (select json_build_object('id', t.id, 'name', t.name, 'email', t.email) from users t
    where t.id = pad.technician_id and t.disabled_at is null) as technician,
  (select coalesce(json_agg(json_build_object('id', m.id, 'name', m.name, 'email', m.email) order by m.created_at), '[]')
    from users m where m.company_id = c.id and m.role = 'manager' and m.disabled_at is null) as managers
from pumps p join pads pad on pad.id = p.pad_id join companies c on c.id = p.company_id
where p.id = any($1::uuid[])`;

const toPerson = ({ id, name, email }: PersonRow): MailPerson => ({ userId: id, name, address: email });

/** Where some pumps stand and who answers for them, by the pump's id. */
export async function listMailPlaces(
  database: Pick<pg.ClientBase, 'query'>,
  pumpIds: readonly string[],
): Promise<Map<string, MailPlace>> {
  const { rows } = await database.query<Row>(SELECT, [pumpIds]);
  return new Map(rows.map((row) => [row.pump_id, toPlace(row)]));
}

const toPlace = (row: Row): MailPlace => ({
  companyId: row.company_id,
  companyName: row.company_name,
  companyZone: row.company_zone,
  mailHours: row.mail_hours,
  padId: row.pad_id,
  padName: row.pad_name,
  street: row.street,
  town: row.town ?? undefined,
  area: row.area ?? undefined,
  zone: row.zone,
  pumpName: row.pump_name,
  customerName: row.customer_name ?? undefined,
  technician: row.technician === null ? undefined : toPerson(row.technician),
  managers: row.managers.map(toPerson),
});

/** Some people who may be written to, by id; whoever has left is not among them. */
export async function listMailPersons(
  database: Pick<pg.ClientBase, 'query'>,
  userIds: readonly string[],
): Promise<Map<string, MailPerson>> {
  if (userIds.length === 0) return new Map();
  const text = 'select id, name, email from users where id = any($1::uuid[]) and disabled_at is null';
  const { rows } = await database.query<PersonRow>(text, [userIds]);
  return new Map(rows.map((row) => [row.id, toPerson(row)]));
}
