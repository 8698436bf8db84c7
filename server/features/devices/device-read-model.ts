import { type SQL, sql } from 'drizzle-orm';
import { likePattern } from '#server/db/like-pattern.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { SortKeys } from '#server/http/page-cursor.ts';

/** A device with the pad it stands on; instants in ms. */
export type DeviceRow = {
  readonly id: string;
  readonly serial: string;
  readonly pumpId: string | null;
  readonly padName: string | null;
  readonly intervalSeconds: number;
  readonly state: 'online' | 'lost' | 'never';
  readonly firmware: string | null;
  readonly heardAt: number | null;
  readonly secretSetAt: number | null;
  readonly revokedAt: number | null;
  readonly refused: number;
  readonly version: number;
};

export type RefusalRow = {
  readonly id: number;
  readonly receivedAt: number;
  readonly reason: string;
  readonly detail: string;
  readonly sample: string;
};

const ms = (column: SQL) => sql`round(extract(epoch from ${column}) * 1000)::float8`;

async function selectDevices(db: Transaction, condition: SQL, limit: number): Promise<DeviceRow[]> {
  const { rows } = await db.execute<DeviceRow>(sql`
    select d.id, d.serial, f.pump_id as "pumpId", pad.name as "padName", d.interval_seconds as "intervalSeconds", d.state,
      d.firmware, ${ms(sql`d.heard_at`)} as "heardAt", ${ms(sql`d.secret_set_at`)} as "secretSetAt",
      ${ms(sql`d.revoked_at`)} as "revokedAt", d.refused, d.version
    from devices d
    left join device_fittings f on f.device_id = d.id and f.starts_at <= now() and (f.ends_at is null or f.ends_at > now())
    left join pumps p on p.id = f.pump_id
    left join pads pad on pad.id = p.pad_id
    where ${condition} order by d.serial limit ${limit}`);
  return rows;
}

/** One device of the company. */
export async function findDevice(db: Transaction, deviceId: string): Promise<DeviceRow | undefined> {
  return (await selectDevices(db, sql`d.id = ${deviceId}`, 1))[0];
}

/** Devices by serial, after a place in the list; one row more than the page. */
export function listDeviceRows(
  db: Transaction,
  query: { readonly q?: string | undefined; readonly limit: number },
  after: SortKeys | undefined,
): Promise<DeviceRow[]> {
  const pattern = likePattern(query.q ?? '');
  const beyond = after === undefined ? sql`true` : sql`d.serial > ${after[0]}`;
  return selectDevices(
    db,
    sql`(d.serial ilike ${pattern} or pad.name ilike ${pattern}) and ${beyond}`,
    query.limit + 1,
  );
}

/** What was refused from a device, newest first; one row more than the page. */
export async function listRefusalRows(
  db: Transaction,
  deviceId: string,
  limit: number,
  after: SortKeys | undefined,
): Promise<RefusalRow[]> {
  const beyond = after === undefined ? sql`true` : sql`id < ${after[0]}`;
  const { rows } = await db.execute<RefusalRow>(sql`
    select id::float8 as id, ${ms(sql`received_at`)} as "receivedAt", reason, detail, sample
    from refused_messages where device_id = ${deviceId} and ${beyond} order by id desc limit ${limit + 1}`);
  return rows;
}
