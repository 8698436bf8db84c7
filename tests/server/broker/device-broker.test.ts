import { afterEach, describe, expect, it } from 'vitest';
import { shardOfSerial } from '#server/broker/shard-of-serial.ts';
import {
  openRawDevice,
  type RawDevice,
  startTestBroker,
  type TestBroker,
  topicOf,
} from '#tests/support/test-broker.ts';

const SERIAL = 'MR-000123';
const running: TestBroker[] = [];
const start = async (...parameters: Parameters<typeof startTestBroker>) => {
  const broker = await startTestBroker(...parameters);
  running.push(broker);
  return broker;
};
afterEach(async () => {
  for (const { broker } of running.splice(0)) await broker.stop();
});

const publish = (device: RawDevice, messageId: number, topic = topicOf(SERIAL, 'readings'), more: object = {}) =>
  device.send({ cmd: 'publish', topic, payload: '{}', qos: 1, messageId, dup: false, retain: false, ...more });

const signIn = async (port: number, serial = SERIAL, change: object = {}) => {
  const device = await openRawDevice(port, serial, change);
  await device.next('connack');
  return device;
};

describe('the broker', () => {
  it('writes a PUBACK only when the message is settled, in the order in which messages came', async () => {
    const { port, waitFor } = await start({ settleAtOnce: false });
    const device = await signIn(port);
    for (const id of [11, 12, 13]) publish(device, id);
    const received = await waitFor(3);
    let acknowledged = false;
    void device.next('puback').then(
      () => (acknowledged = true),
      () => undefined,
    );
    // A ping that comes back shows that whatever the broker had to write before it has been written.
    device.send({ cmd: 'pingreq' });
    const second = await signIn(port, 'MR-000124');
    second.send({ cmd: 'pingreq' });
    await second.next('pingresp');
    expect(acknowledged).toBe(false);
    for (const { settle } of received) settle();
    await expect.poll(() => acknowledged).toBe(true);
    expect([await device.next('puback'), await device.next('puback')]).toMatchObject([
      { messageId: 12 },
      { messageId: 13 },
    ]);
  });

  it('closes the connection without a PUBACK when a message could not be stored', async () => {
    const { port, waitFor } = await start({ settleAtOnce: false });
    const device = await signIn(port);
    publish(device, 1);
    const [first] = await waitFor(1);
    first!.settle(new Error('no database'));
    await expect(device.next('puback')).rejects.toThrow(/closed/);
  });

  it.each([
    ['a wrong password', { password: Buffer.from('wrong') }, 4],
    ['no password', { password: undefined }, 4],
    ['a user name that is not the serial', { username: 'MR-000999' }, 4],
    ['a client id that is no serial', { clientId: 'lower-case', username: 'lower-case' }, 2],
    ['a keep-alive of 30 s', { keepalive: 30 }, 5],
    ['no keep-alive', { keepalive: 0 }, 5],
    [
      'a will for another device',
      { will: { topic: topicOf('MR-000999', 'status'), payload: Buffer.from('{}'), qos: 1, retain: false } },
      5,
    ],
  ])('refuses %s', async (_what, change, returnCode) => {
    const { port, broker } = await start();
    const device = await openRawDevice(port, SERIAL, change);
    expect(await device.next('connack')).toMatchObject({ returnCode });
    await device.closed;
    expect(broker.countConnected()).toBe(0);
  });

  it('says that it is unavailable when it cannot ask who a device is', async () => {
    const { port } = await start({ findCredential: () => Promise.reject(new Error('database down')) });
    const device = await openRawDevice(port, SERIAL);
    expect(await device.next('connack')).toMatchObject({ returnCode: 3 });
  });

  it('refuses a revoked device', async () => {
    const { port } = await start({ findCredential: async (serial) => ({ serial, secretHash: undefined }) });
    const device = await openRawDevice(port, SERIAL);
    expect(await device.next('connack')).toMatchObject({ returnCode: 4 });
  });

  it('forgets the session even where a device asks to keep it', async () => {
    const { port } = await start();
    const first = await signIn(port, SERIAL, { clean: false });
    first.send({ cmd: 'subscribe', messageId: 1, subscriptions: [{ topic: topicOf(SERIAL, 'notice'), qos: 1 }] });
    await first.next('suback');
    first.socket.destroy();
    const second = await openRawDevice(port, SERIAL, { clean: false });
    expect(await second.next('connack')).toMatchObject({ returnCode: 0, sessionPresent: false });
  });

  it.each([
    ['another device', topicOf('MR-000124', 'readings'), {}],
    [
      'a foreign shard',
      `millrace/v1/${((shardOfSerial(SERIAL) + 1) % 64).toString(16).padStart(2, '0')}/${SERIAL}/readings`,
      {},
    ],
    ['its own notice', topicOf(SERIAL, 'notice'), {}],
    ['anything else', 'anything/else', {}],
    ['its own readings at QoS 2', topicOf(SERIAL, 'readings'), { qos: 2 }],
  ])('closes the connection of a device that publishes to %s', async (_what, topic, more) => {
    const { port, received } = await start();
    const device = await signIn(port);
    publish(device, 1, topic, more);
    await device.closed;
    expect(received).toEqual([]);
  });

  it('grants the own notice topic and nothing else', async () => {
    const { port, broker } = await start();
    const device = await signIn(port);
    const topics = [
      topicOf(SERIAL, 'notice'),
      topicOf(SERIAL, 'readings'),
      topicOf('MR-000124', 'notice'),
      '#',
      '$SYS/#',
    ];
    for (const [index, topic] of topics.entries()) {
      device.send({ cmd: 'subscribe', messageId: index + 1, subscriptions: [{ topic, qos: 1 }] });
    }
    const granted = [];
    for (const _ of topics) granted.push(((await device.next('suback')) as { granted: number[] }).granted[0]);
    expect(granted).toEqual([1, 128, 128, 128, 128]);
    broker.sendNotice(SERIAL, { bad: 3, reason: 'ahead' });
    const notice = (await device.next('publish')) as unknown as { topic: string; payload: Buffer };
    expect(notice.topic).toBe(topicOf(SERIAL, 'notice'));
    expect(JSON.parse(notice.payload.toString())).toEqual({ bad: 3, reason: 'ahead' });
  });

  it('keeps no retained message', async () => {
    const { port, waitFor } = await start();
    const device = await signIn(port);
    publish(device, 1, topicOf(SERIAL, 'status'), { retain: true });
    await device.next('puback');
    await waitFor(1);
    device.send({ cmd: 'subscribe', messageId: 2, subscriptions: [{ topic: topicOf(SERIAL, 'status'), qos: 1 }] });
    expect(await device.next('suback')).toMatchObject({ granted: [128] });
  });

  it('takes the will of a connection that breaks as a status message, and none after a farewell', async () => {
    const { port, waitFor, received } = await start();
    const will = {
      topic: topicOf(SERIAL, 'status'),
      payload: Buffer.from('{"state":"lost"}'),
      qos: 1 as const,
      retain: false,
    };
    const first = await signIn(port, SERIAL, { will });
    first.socket.destroy();
    const [message] = await waitFor(1);
    expect(message!.message).toMatchObject({ serial: SERIAL, kind: 'status' });
    expect(message!.message.payload.toString()).toBe('{"state":"lost"}');
    const second = await signIn(port, SERIAL, { will });
    second.send({ cmd: 'disconnect' });
    await second.closed;
    const third = await signIn(port);
    publish(third, 1);
    await third.next('puback');
    expect(received.map(({ message: { kind } }) => kind)).toEqual(['status', 'readings']);
  });

  it('lets a second connection take over, with the will of the first', async () => {
    const { port, waitFor, broker } = await start();
    const will = {
      topic: topicOf(SERIAL, 'status'),
      payload: Buffer.from('first is lost'),
      qos: 1 as const,
      retain: false,
    };
    const first = await signIn(port, SERIAL, { will });
    const second = await signIn(port);
    await first.closed;
    await waitFor(1);
    publish(second, 5);
    expect(await second.next('puback')).toMatchObject({ messageId: 5 });
    expect(broker.countConnected()).toBe(1);
  });

  it('takes QoS 0 without a PUBACK', async () => {
    const { port, waitFor } = await start();
    const device = await signIn(port);
    device.send({
      cmd: 'publish',
      topic: topicOf(SERIAL, 'readings'),
      payload: '{}',
      qos: 0,
      dup: false,
      retain: false,
    });
    expect((await waitFor(1))[0]!.message.kind).toBe('readings');
  });

  it('closes the connection of a device whose secret changed', async () => {
    const { port, broker } = await start();
    const device = await signIn(port);
    broker.closeDevice(SERIAL);
    await device.closed;
    expect(broker.listSerials()).toEqual([]);
  });

  it('refuses a packet above 128 KiB by its header, and holds nothing of it', async () => {
    const { port, received } = await start();
    const device = await signIn(port);
    device.socket.write(Buffer.from([0x32, 0x81, 0x80, 0x08]));
    await device.closed;
    const largest = await signIn(port, 'MR-000124');
    const topic = topicOf('MR-000124', 'readings');
    publish(largest, 1, topic, { payload: Buffer.alloc(128 * 1024 - topic.length - 4) });
    expect(await largest.next('puback')).toMatchObject({ messageId: 1 });
    expect(received.length).toBe(1);
  });

  it('refuses a large CONNECT before anybody signed in', async () => {
    const { port } = await start();
    const device = await openRawDevice(port);
    device.socket.write(Buffer.from([0x10, 0xff, 0xff, 0xff, 0x7f]));
    await device.closed;
  });

  it('caps the sockets on which nobody has signed in', async () => {
    const { port } = await start({ maxWaitingForSignIn: 2 });
    const idle = [await openRawDevice(port), await openRawDevice(port)];
    const third = await openRawDevice(port);
    await third.closed;
    idle[0]!.socket.destroy();
    await idle[0]!.closed;
    await expect
      .poll(async () => {
        const device = await openRawDevice(port, SERIAL).catch(() => undefined);
        return device?.next('connack').catch(() => undefined);
      })
      .toMatchObject({ returnCode: 0 });
  });

  it('slows a device above its rate and then refuses it', async () => {
    let now = 0;
    const { port, received } = await start({ now: () => now });
    const device = await signIn(port);
    // All in one piece: while the broker makes a device wait it reads no further, and here time stands still.
    device.socket.cork();
    for (let id = 1; id <= 801; id += 1) publish(device, id);
    device.socket.uncork();
    await device.closed;
    // The burst went through at once, what was slowed was still taken, what was refused was not.
    expect(received.length).toBe(800);
    now += 60_000;
    const again = await signIn(port);
    publish(again, 1);
    expect(await again.next('puback')).toMatchObject({ messageId: 1 });
  });

  it('refuses MQTT 5', async () => {
    const { port } = await start();
    const device = await openRawDevice(port, SERIAL, { protocolVersion: 5 });
    expect(await device.next('connack')).toMatchObject({ returnCode: 1 });
  });

  it('will not listen beyond loopback without TLS', async () => {
    await expect(startTestBroker({ host: '0.0.0.0' })).rejects.toThrow(/MQTT_TLS_KEY/);
  });

  it('publishes no wills when it stops itself', async () => {
    const { port, broker, received } = await start();
    const will = { topic: topicOf(SERIAL, 'status'), payload: Buffer.from('lost'), qos: 1 as const, retain: false };
    const device = await signIn(port, SERIAL, { will });
    broker.quiesce();
    await broker.stop();
    await device.closed;
    expect(received).toEqual([]);
  });
});
