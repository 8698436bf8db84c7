import type pg from 'pg';
import type { KnownDevice } from './known-device.ts';

type Row = {
  readonly serial: string;
  readonly device_id: string;
  readonly company_id: string;
  readonly secret_hash: Buffer | null;
  readonly pump_id: string | null;
  readonly pump_number: number | null;
  readonly input_count: number | null;
};

/** Inputs a motor may have where its model is not recorded: the wire knows no more. */
const MOST_INPUTS = 8;

const SELECT = `
select d.serial, d.id as device_id, d.company_id,
  case when d.revoked_at is null then d.secret_hash end as secret_hash,
  p.id as pump_id, p.number as pump_number, mm.input_count
from devices d
left join device_fittings f on f.device_id = d.id and f.starts_at <= now() and (f.ends_at is null or f.ends_at > now())
left join pumps p on p.id = f.pump_id
left join motor_fittings mf on mf.pump_id = p.id and mf.starts_at <= now() and (mf.ends_at is null or mf.ends_at > now())
left join motors m on m.id = mf.motor_id
left join motor_models mm on mm.id = m.model_id
where d.serial = any($1::text[])`;

/** Loads the devices with these serials; those that do not exist are missing from the answer. */
export async function listKnownDevices(
  database: Pick<pg.Pool, 'query'>,
  serials: readonly string[],
): Promise<KnownDevice[]> {
  const { rows } = await database.query<Row>({ name: 'known-devices', text: SELECT, values: [serials] });
  return rows.map((row) => ({
    serial: row.serial,
    deviceId: row.device_id,
    companyId: row.company_id,
    secretHash: row.secret_hash ?? undefined,
    pump:
      row.pump_id === null || row.pump_number === null
        ? undefined
        : { id: row.pump_id, number: row.pump_number, inputCount: row.input_count ?? MOST_INPUTS },
  }));
}
