import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { asMachine } from '#server/db/transaction.ts';
import { makePartitionsBetween } from '#server/fold/history/history-repository.ts';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { querySuperuser, startTestStream, type TestStream } from '#tests/support/test-stream.ts';

/* Real devices with a will on a real database; the server's clock is the tests' own. */
const MINUTE = 60_000;
const NIGHT = Date.UTC(2026, 9, 20, 8);

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
let now = NIGHT;
const connections = new Map<string, RawDevice>();

const start = async () => {
  running = await startTestStream(database.databaseUrl, { now: () => now, wallClock: Date.now });
};
beforeAll(async () => {
  database = await createFreshDatabase();
  await start();
  await asMachine(running.pools.machine, (_db, client) =>
    makePartitionsBetween(client, NIGHT - 24 * 60 * MINUTE, NIGHT + 7 * 24 * 60 * MINUTE),
  );
});
afterAll(async () => {
  await running.stop();
  await database.drop();
});

type Pump = TestCompany['pumps'][number];
const query = <Row extends Record<string, unknown>>(text: string, ...values: unknown[]) =>
  querySuperuser<Row>(database.superuserUrl, text, values);
const folded = () =>
  expect
    .poll(async () => {
      await running.stream.drain();
      const { lagMs, behind } = running.stream.count().fold;
      return lagMs + behind;
    })
    .toBe(0);

async function publish(device: RawDevice, serial: string, kind: 'status' | 'readings', payload: string) {
  device.send({
    cmd: 'publish',
    topic: topicOf(serial, kind),
    payload,
    messageId: 7,
    qos: 1,
    dup: false,
    retain: false,
  });
  await device.next('puback');
}

async function connect({ serial, secret }: Pump): Promise<void> {
  const connection = randomUUID();
  const will = { topic: topicOf(serial, 'status'), payload: encodeStatus({ state: 'lost', connection }), qos: 1 };
  const sign = { password: Buffer.from(secret), will: { ...will, retain: false } };
  const device = await openRawDevice(running.port, serial, sign);
  await device.next('connack');
  connections.set(serial, device);
  const status = { state: 'online', connection, boot: randomUUID(), upSeconds: 5, firmware: '1.0' } as const;
  await publish(device, serial, 'status', encodeStatus(status));
}
const connectAll = async (pumps: readonly Pump[]) => {
  for (const pump of pumps) await connect(pump);
  await folded();
};

/** These devices' connections break, without a goodbye; resolves when the server knows it. */
async function drop(pumps: readonly Pump[]): Promise<void> {
  for (const { serial } of pumps) connections.get(serial)?.socket.destroy();
  const isGone = 'select count(*)::int as count from pump_states where lost_at is not null and pump_id = any($1)';
  const pumpIds = pumps.map(({ pumpId }) => pumpId);
  await expect
    .poll(async () => {
      await running.stream.drain();
      return (await query(isGone, pumpIds))[0]?.count;
    })
    .toBe(pumps.length);
}

/** Time passes in steps of half a minute, and these devices go on speaking. */
async function goOn(pumps: readonly Pump[], until: number): Promise<void> {
  while (now < until) {
    now = Math.min(until, now + MINUTE / 2);
    const idle = { at: now, rpm: 0, watts: 6, closedInputs: 0, activeInput: 0, reportedSource: 'off' } as const;
    await Promise.all(
      pumps.map(({ serial }) => publish(connections.get(serial)!, serial, 'readings', encodeReadings([idle]))),
    );
    await folded();
    running.stream.tick();
    await folded();
  }
}

async function restart(while_: () => void = () => undefined): Promise<void> {
  await running.stop();
  connections.clear();
  while_();
  await start();
  await folded();
}

async function makeFleet() {
  const { companyId, pumps } = await makeTestCompany(running.pools.machine, { pads: 19 });
  await connectAll(pumps);
  await goOn(pumps, now + 3 * MINUTE);
  const every = (count: number) => pumps.filter((_, index) => index % count === 0);
  const links = () =>
    query(
      'select state, priority, evidence from alarms where company_id = $1 and group_kind = $2',
      companyId,
      'own-link',
    );
  return { pumps, some: every(3), others: pumps.filter((_, index) => index % 3 !== 0), links };
}

describe('our own link', () => {
  it('raises one alarm when a third of all devices drops and stays away, which returns with them', async () => {
    const { pumps, some, others, links } = await makeFleet();
    await drop(some);
    const from = now;
    await goOn(others, from + MINUTE);
    expect(await links()).toEqual([]);
    await goOn(others, from + 3 * MINUTE);
    const raised = { priority: 'urgent', evidence: { pumps: some.length, stillStanding: some.length } };
    expect(await links()).toMatchObject([{ ...raised, state: 'unacknowledged' }]);
    await goOn(others, from + 15 * MINUTE);
    expect(await links()).toMatchObject([{ ...raised, state: 'unacknowledged' }]);

    await connectAll(some);
    await goOn(pumps, now + MINUTE);
    expect(await links()).toMatchObject([{ state: 'returned' }]);
  });

  it('stands through a restart of the server', async () => {
    const { pumps, some, others, links } = await makeFleet();
    await drop(some);
    await goOn(others, now + 3 * MINUTE);
    await restart();
    await connectAll(others);
    await goOn(others, now + 6 * MINUTE);
    expect(await links()).toMatchObject([{ state: 'unacknowledged' }]);
    await connectAll(some);
    await goOn(pumps, now + MINUTE);
    expect(await links()).toMatchObject([{ state: 'returned' }]);
  });

  it('raises nothing when the devices are back within two minutes', async () => {
    const { pumps, some, others, links } = await makeFleet();
    await drop(some);
    await goOn(others, now + 1.5 * MINUTE);
    await connectAll(some);
    await goOn(pumps, now + 5 * MINUTE);
    expect(await links()).toEqual([]);
  });

  it('raises nothing when it was we who stopped, whether the devices come back or not', async () => {
    const { pumps, others, links } = await makeFleet();
    await restart(() => {
      now += 20 * MINUTE;
    });
    await connectAll(others);
    await goOn(others, now + 6 * MINUTE);
    expect(await links()).toEqual([]);
    await connectAll(pumps.filter((pump) => !others.includes(pump)));

    // The devices stop before us, as they do when all programs are ended in order.
    await drop(pumps);
    await restart();
    await goOn([], now + 6 * MINUTE);
    expect(await links()).toEqual([]);
  });

  it('raises nothing for what drops before it listened for a full limit', async () => {
    const { pumps, some, others, links } = await makeFleet();
    await restart();
    await connectAll(pumps);
    now += MINUTE;
    await drop(some);
    await goOn(others, now + 10 * MINUTE);
    expect(await links()).toEqual([]);
  });

  it('raises nothing for devices that say nothing while they stay connected', async () => {
    const { others, links } = await makeFleet();
    await goOn(others, now + 15 * MINUTE);
    expect(await links()).toEqual([]);
  });
});
