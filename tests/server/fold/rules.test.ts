import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';
import { queryOf } from '#tests/support/folded-stream.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { startTestStream, type TestStream } from '#tests/support/test-stream.ts';

/* The pump of the first pad runs its program, 1700 rpm, from 08:00 to 18:00; it is yesterday noon there. */
const NOON = instantOf('America/Los_Angeles', Math.floor(Date.now() / 86_400_000) - 1, 720) ?? 0;
const MINUTE = 60_000;

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
let company: TestCompany;
let device: RawDevice;
let messages = 0;

beforeAll(async () => {
  database = await createFreshDatabase();
  running = await startTestStream(database.databaseUrl, { now: () => NOON });
  company = await makeTestCompany(running.pools.machine);
  const [pump] = company.pumps;
  device = await openRawDevice(running.port, pump!.serial, { password: Buffer.from(pump!.secret) });
  await device.next('connack');
});
afterAll(async () => {
  device.socket.destroy();
  await running.stop();
  await database.drop();
});

const query = queryOf(() => database);

/** The pump at a speed from one minute before noon to another. */
async function play(from: number, to: number, rpm: number): Promise<void> {
  const readings: Reading[] = [];
  for (let at = NOON + from * MINUTE; at < NOON + to * MINUTE; at += 10_000) {
    const watts = rpm === 0 ? 6 : 420;
    readings.push({ at, rpm, watts, closedInputs: 0, activeInput: 0, reportedSource: 'program' });
  }
  messages += 1;
  const what = { topic: topicOf(company.pumps[0]!.serial, 'readings'), messageId: messages, dup: false, retain: false };
  device.send({ cmd: 'publish', ...what, payload: encodeReadings(readings), qos: 1 });
  await device.next('puback');
  await running.stream.drain();
}

async function setRules(rules: object): Promise<void> {
  await query(
    `insert into rule_settings (id, company_id, pump_id, rules, changed_at) values (gen_random_uuid(), $1, $2, $3, now())
     on conflict (company_id, model_id, pump_id) do update set rules = excluded.rules`,
    company.companyId,
    company.pumps[0]!.pumpId,
    JSON.stringify(rules),
  );
  await query(`select pg_notify('millrace_context', $1)`, company.pumps[0]!.pumpId);
}
const alarms = () =>
  query<{ detector: string; priority: string; state: string }>(
    'select detector, priority, state from alarms where pump_id = $1 order by raised_at',
    company.pumps[0]!.pumpId,
  );

describe('a rule that somebody changes', () => {
  it('holds for the next reading, without a restart: a shorter delay, a priority, and off', async () => {
    await play(-60, -40, 1700);
    await play(-40, -32, 0);
    expect(await alarms()).toEqual([]);

    await setRules({ stopped: { figures: { delaySeconds: 300 }, priority: 'urgent' } });
    // The notice is on its way: the pump goes on standing until it has been heard.
    let minute = -32;
    await expect
      .poll(async () => {
        await play(minute, minute + 0.5, 0);
        minute += 0.5;
        return alarms();
      })
      .toEqual([{ detector: 'stopped', priority: 'urgent', state: 'unacknowledged' }]);

    await setRules({ stopped: { enabled: false } });
    await expect
      .poll(async () => {
        await play(minute, minute + 0.5, 0);
        minute += 0.5;
        return (await alarms())[0]?.state;
      })
      // Its mail had not left, and the readings are of an hour ago: history at once.
      .toBe('normal');
  });
});
