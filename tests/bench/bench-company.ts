import { randomBytes, randomUUID } from 'node:crypto';
import type pg from 'pg';
import { hashDeviceSecret } from '#server/broker/device-credential.ts';
import { shardOfSerial } from '#server/broker/shard-of-serial.ts';
import { buildTopic } from '#shared/contract/mqtt/topics.ts';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import type { DeviceLogin } from './load-device.ts';

export const BENCH_DEVICE_KEY = 'device-key-of-the-bench-0123456789abcdef';

const EVERY_DAY = [true, true, true, true, true, true, true];
const SETTINGS = {
  inputs: [2850, 2400, null],
  program: [{ days: EVERY_DAY, fromMinute: 0, toMinute: 1440, rpm: 1700 }],
  prime: { rpm: 3450, seconds: 60 },
  timed: null,
  freeze: { celsius: 4, rpm: 1000 },
  maxRpm: 3450,
  minRpm: 600,
};

/** A company of as many pumps, each on a pad of its own with a device; answers the devices' logins. Fast, by SQL. */
export async function makeBenchCompany(owner: pg.ClientBase, pumps: number): Promise<DeviceLogin[]> {
  const mark = randomBytes(3).toString('hex').toUpperCase();
  const companyId = randomUUID();
  const modelId = randomUUID();
  const hours = { days: EVERY_DAY, fromMinute: 0, toMinute: 1440 };
  await owner.query(`insert into companies (id, name, zone, mail_hours) values ($1, $2, 'America/Phoenix', $3)`, [
    companyId,
    `Bench ${mark}`,
    hours,
  ]);
  await owner.query(
    `insert into motor_models (id, company_id, name, frame, total_horsepower, service_factor, input_count, terminal_order, traits)
     values ($1, $2, 'Three inputs', '56Y', 1.65, 1.1, 3, '[1,2,3]', $3)`,
    [modelId, companyId, DEFAULT_TRAITS],
  );
  const secret = randomBytes(32).toString('base64url');
  const serials = Array.from({ length: pumps }, (_, index) => `B${mark}-${String(index).padStart(5, '0')}`);
  await owner.query(
    `with made as (select s.serial, gen_random_uuid() as pad, gen_random_uuid() as pump, gen_random_uuid() as motor,
        gen_random_uuid() as device from unnest($2::text[]) as s(serial)),
      pads as (insert into pads (id, company_id, name, street, zone)
        select pad, $1, serial, serial, 'America/Phoenix' from made),
      pumps as (insert into pumps (id, company_id, pad_id, name, settings) select pump, $1, pad, 'Filter pump', $5::jsonb from made),
      motors as (insert into motors (id, company_id, model_id, serial) select motor, $1, $3, serial from made),
      fitted as (insert into motor_fittings (id, company_id, motor_id, pump_id, starts_at)
        select gen_random_uuid(), $1, motor, pump, now() - interval '1 year' from made),
      devices as (insert into devices (id, company_id, serial, secret_hash, secret_set_at)
        select device, $1, serial, $4, now() from made)
      insert into device_fittings (id, company_id, device_id, pump_id, starts_at)
        select gen_random_uuid(), $1, device, pump, now() - interval '1 year' from made`,
    [companyId, serials, modelId, hashDeviceSecret(BENCH_DEVICE_KEY, secret), JSON.stringify(SETTINGS)],
  );
  return serials.map((serial) => ({
    serial,
    secret,
    topic: buildTopic({ shard: shardOfSerial(serial), serial, kind: 'readings' }),
  }));
}
