import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { createFreshDatabase } from '#tests/support/test-database.ts';
import { mosquittoPublish, querySuperuser, startTestStream, type TestStream } from '#tests/support/test-stream.ts';

let database: Awaited<ReturnType<typeof createFreshDatabase>>;
let running: TestStream;
let company: TestCompany;
beforeAll(async () => {
  database = await createFreshDatabase();
  running = await startTestStream(database.databaseUrl);
  company = await makeTestCompany(running.pools.machine, { pads: 12 });
});
afterAll(async () => {
  await running.stop();
  await database.drop();
});

const reading = (at: number, change: Partial<Reading> = {}): Reading => ({
  at,
  rpm: 1700,
  closedInputs: 0,
  activeInput: 0,
  watts: 412.5,
  ...change,
});
const stored = (pumpId: string) =>
  querySuperuser<Record<string, unknown>>(
    database.superuserUrl,
    `select r.*, date_part('epoch', r.at) * 1000 as at_ms from readings r join pumps p on p.number = r.pump_number
     where p.id = $1 order by r.sequence`,
    [pumpId],
  );
const refused = (deviceId: string) =>
  querySuperuser<{ reason: string; detail: string; sample: string }>(
    database.superuserUrl,
    'select reason, detail, sample from refused_messages where device_id = $1 order by id',
    [deviceId],
  );
const recent = () => Date.now() - 60_000;
const signIn = async ({ serial, secret }: { serial: string; secret: string }, change: object = {}) => {
  const device = await openRawDevice(running.port, serial, { password: Buffer.from(secret), ...change });
  expect(await device.next('connack')).toMatchObject({ returnCode: 0 });
  return device;
};
let messageId = 0;
const send = (device: RawDevice, serial: string, kind: 'readings' | 'status' | 'settings', payload: string) => {
  messageId += 1;
  device.send({ cmd: 'publish', topic: topicOf(serial, kind), payload, qos: 1, messageId, dup: false, retain: false });
  return messageId;
};

describe('a reading published by another MQTT client', () => {
  it('is stored with everything it says by the time it is acknowledged', async () => {
    const pump = company.pumps[0]!;
    const at = recent();
    const said = reading(at, {
      rpm: 2850.5,
      closedInputs: 3,
      activeInput: 1,
      reportedSource: 'input',
      volts: 231,
      driveCelsius: 41,
      ambientCelsius: -2.5,
      motorClockMinute: 707,
      fault: 'E"1\\',
    });
    await mosquittoPublish(running.port, pump, encodeReadings([said]));
    const [row] = await stored(pump.pumpId);
    expect(row).toMatchObject({
      at_ms: at,
      rpm: 2850.5,
      watts: 412.5,
      volts: 231,
      drive_celsius: 41,
      ambient_celsius: -2.5,
      closed_inputs: 3,
      active_input: 1,
      source: 2,
      motor_clock: 707,
      flags: 1,
      fault: 'E"1\\',
    });
    expect(Number(row!.received_at) - at).toBeGreaterThan(50_000);
  });

  it('is refused with a wrong secret', async () => {
    const pump = company.pumps[1]!;
    await expect(
      mosquittoPublish(running.port, { ...pump, secret: 'wrong' }, encodeReadings([reading(recent())])),
    ).rejects.toThrow();
    expect(await stored(pump.pumpId)).toEqual([]);
  });

  it('is refused on a topic of another device', async () => {
    const [, pump, other] = company.pumps;
    const topic = topicOf(other!.serial, 'readings');
    await expect(
      mosquittoPublish(running.port, pump!, encodeReadings([reading(recent())]), { topic }),
    ).rejects.toThrow();
    expect(await stored(other!.pumpId)).toEqual([]);
  });

  it('sent again changes nothing: the first wins', async () => {
    const pump = company.pumps[3]!;
    const at = recent();
    await mosquittoPublish(running.port, pump, encodeReadings([reading(at)]));
    await mosquittoPublish(running.port, pump, encodeReadings([reading(at, { rpm: 3000 }), reading(at + 1000)]));
    expect((await stored(pump.pumpId)).map(({ rpm }) => rpm)).toEqual([1700, 1700]);
  });
});

describe('messages of one device', () => {
  it('are acknowledged in the order in which they came, good and bad alike', async () => {
    const pump = company.pumps[4]!;
    const device = await signIn(pump);
    const begin = recent();
    const ids: number[] = [];
    for (let index = 0; index < 120; index += 1) {
      const payload = index % 5 === 4 ? 'not json' : encodeReadings([reading(begin + index * 100)]);
      ids.push(send(device, pump.serial, index % 7 === 6 ? 'settings' : 'readings', payload));
    }
    const acknowledged: unknown[] = [];
    for (const _ of ids) acknowledged.push(((await device.next('puback')) as { messageId: number }).messageId);
    expect(acknowledged).toEqual(ids);
    device.socket.destroy();
  });

  it('keep their order in the arrival sequence, readings and events together', async () => {
    const pump = company.pumps[5]!;
    const device = await signIn(pump);
    const begin = recent();
    const connection = randomUUID();
    send(device, pump.serial, 'readings', encodeReadings([reading(begin), reading(begin + 1000)]));
    const online = { state: 'online', conn: connection, boot: randomUUID(), up: 5, fw: '1.4.2' };
    send(device, pump.serial, 'status', JSON.stringify(online));
    send(device, pump.serial, 'readings', encodeReadings([reading(begin + 2000)]));
    send(device, pump.serial, 'settings', JSON.stringify({ max: 3450, inputs: [2850, null] }));
    for (let count = 0; count < 4; count += 1) await device.next('puback');
    const order = await querySuperuser<{ what: string }>(
      database.superuserUrl,
      `select 'reading' as what, sequence from readings r join pumps p on p.number = r.pump_number where p.id = $1
       union all select kind, sequence from device_events where pump_id = $1 order by sequence`,
      [pump.pumpId],
    );
    expect(order.map(({ what }) => what)).toEqual(['reading', 'reading', 'status', 'reading', 'settings']);
    const [row] = await querySuperuser(database.superuserUrl, 'select * from devices where id = $1', [pump.deviceId]);
    expect(row).toMatchObject({ state: 'online', connection, firmware: '1.4.2' });
    device.socket.destroy();
  });

  it('tell a lost connection from one that was taken over', async () => {
    const pump = company.pumps[6]!;
    const will = (conn: string) => ({
      will: {
        topic: topicOf(pump.serial, 'status'),
        payload: Buffer.from(JSON.stringify({ state: 'lost', conn })),
        qos: 1,
        retain: false,
      },
    });
    const state = async () =>
      (await querySuperuser(database.superuserUrl, 'select state from devices where id = $1', [pump.deviceId]))[0]!
        .state;
    const connections = [randomUUID(), randomUUID()];
    const open = async (conn: string) => {
      const device = await signIn(pump, will(conn));
      send(
        device,
        pump.serial,
        'status',
        JSON.stringify({ state: 'online', conn, boot: randomUUID(), up: 1, fw: '1' }),
      );
      await device.next('puback');
      return device;
    };
    const first = await open(connections[0]!);
    const second = await open(connections[1]!);
    await first.closed;
    const kinds = () =>
      querySuperuser(
        database.superuserUrl,
        `select body ->> 'state' as state from device_events where device_id = $1 order by sequence`,
        [pump.deviceId],
      );
    await expect.poll(async () => (await kinds()).length).toBe(3);
    expect(await state()).toBe('online');
    second.socket.destroy();
    await expect.poll(state).toBe('lost');
    const third = await signIn(pump, will(connections[1]!));
    const at = recent();
    send(third, pump.serial, 'readings', JSON.stringify([{ t: at, rpm: 1700, in: 0, act: 0, w: 400 }]));
    await third.next('puback');
    // It said nothing of a new connection, and yet it is there.
    expect(await state()).toBe('online');
    third.socket.destroy();
  });
});

describe('what is refused', () => {
  it('is kept with its reason and acknowledged, and nothing good beside it is lost', async () => {
    const pump = company.pumps[7]!;
    const at = recent();
    const payload = `[{"t":${at},"rpm":1700,"in":0,"act":0,"w":400},{"t":${at + 1000},"rpm":1700,"in":0,"act":0,"w":nan},
      {"t":${at + 2000},"rpm":-1,"in":0,"act":0,"w":400},{"t":${at + 3000},"rpm":1700,"in":64,"act":0,"w":400},
      {"t":${at + 4000},"rpm":1700,"in":0,"act":0,"w":400,"v":"\\u0000"}]`;
    await mosquittoPublish(running.port, pump, payload);
    expect((await stored(pump.pumpId)).map(({ at_ms }) => at_ms)).toEqual([at, at + 4000]);
    const [refusal] = await refused(pump.deviceId);
    expect(refusal!.reason).toBe('w-not-a-number');
    expect(refusal!.detail).toBe('w-not-a-number (1), rpm-negative (1), in-beyond-model (1), field-v (1)');
    const [device] = await querySuperuser(database.superuserUrl, 'select refused from devices where id = $1', [
      pump.deviceId,
    ]);
    expect(device).toEqual({ refused: 4 });
  });

  it.each([
    ['ahead', () => Date.now() + 10 * 60_000],
    ['too-old', () => Date.now() - 75 * 86_400_000],
  ])('is a reading that is %s', async (reason, at) => {
    const pump = company.pumps[8]!;
    await mosquittoPublish(running.port, pump, encodeReadings([reading(at())]));
    expect(await stored(pump.pumpId)).toEqual([]);
    expect((await refused(pump.deviceId)).at(-1)!.reason).toBe(reason);
  });

  it('is taken up to the edge of what is kept', async () => {
    const pump = company.pumps[8]!;
    const oldest = Date.now() - 59 * 86_400_000;
    await mosquittoPublish(running.port, pump, encodeReadings([reading(oldest), reading(Date.now() + 4 * 60_000)]));
    expect((await stored(pump.pumpId)).length).toBe(2);
  });

  it('is what a device without a pump says, by name', async () => {
    const pump = company.pumps[9]!;
    await querySuperuser(
      database.superuserUrl,
      `update device_fittings set ends_at = now() - interval '1 second' where device_id = $1`,
      [pump.deviceId],
    );
    await mosquittoPublish(running.port, pump, encodeReadings([reading(recent())]));
    expect((await refused(pump.deviceId)).map(({ reason }) => reason)).toEqual(['unassigned']);
  });

  it('is told to the device itself, once a minute', async () => {
    const pump = company.pumps[10]!;
    const device = await signIn(pump);
    device.send({ cmd: 'subscribe', messageId: 1, subscriptions: [{ topic: topicOf(pump.serial, 'notice'), qos: 1 }] });
    await device.next('suback');
    send(device, pump.serial, 'readings', '[]');
    const notice = (await device.next('publish')) as unknown as { payload: Buffer };
    expect(JSON.parse(notice.payload.toString())).toEqual({ bad: 1, reason: 'empty' });
    send(device, pump.serial, 'readings', '[]');
    const last = send(device, pump.serial, 'readings', '[]');
    for (;;) {
      const acknowledged = (await device.next('puback')) as { messageId: number };
      if (acknowledged.messageId === last) break;
    }
    device.send({ cmd: 'pingreq' });
    await device.next('pingresp');
    await expect(Promise.race([device.next('publish'), Promise.resolve('nothing')])).resolves.toBe('nothing');
    device.socket.destroy();
  });
});

describe('a device whose secret is revoked', () => {
  it('loses its open connection and does not get in again', async () => {
    const pump = company.pumps[11]!;
    const device = await signIn(pump);
    await running.pools.machine.query('update devices set revoked_at = now() where id = $1', [pump.deviceId]);
    await running.pools.machine.query(`select pg_notify('millrace_credentials', $1)`, [pump.serial]);
    await device.closed;
    const again = await openRawDevice(running.port, pump.serial, { password: Buffer.from(pump.secret) });
    expect(await again.next('connack')).toMatchObject({ returnCode: 4 });
  });
});
