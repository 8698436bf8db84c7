import { connect } from 'node:tls';
import mqttPacket from 'mqtt-packet';
import { afterEach, describe, expect, it } from 'vitest';
import { SECRET, startTestBroker, type TestBroker, topicOf } from '#tests/support/test-broker.ts';
import { TEST_TLS } from '#tests/support/test-certificate.data.ts';

const SERIAL = 'MR-000123';
const CONNECT = mqttPacket.generate({
  cmd: 'connect',
  clientId: SERIAL,
  username: SERIAL,
  password: Buffer.from(SECRET),
  keepalive: 60,
  clean: true,
  protocolVersion: 4,
  protocolId: 'MQTT',
});

let running: TestBroker | undefined;
afterEach(() => running?.broker.stop());

async function openTls(port: number) {
  const socket = connect({ port, host: 'localhost', ca: TEST_TLS.certificate });
  await new Promise<void>((resolve, reject) => {
    socket.once('secureConnect', () => resolve());
    socket.once('error', reject);
  });
  const closed = new Promise<void>((resolve) => socket.once('close', () => resolve()));
  const next = () => new Promise<Buffer>((resolve) => socket.once('data', resolve));
  return { socket, closed, next };
}

describe('devices over TLS', () => {
  it('are served, on an address that is not loopback too', async () => {
    running = await startTestBroker({ host: '0.0.0.0', tls: TEST_TLS });
    const device = await openTls(running.port);
    const answer = device.next();
    device.socket.write(CONNECT);
    expect((await answer).subarray(0, 4)).toEqual(Buffer.from([0x20, 2, 0, 0]));
    const acknowledged = device.next();
    const publish = {
      cmd: 'publish',
      topic: topicOf(SERIAL, 'readings'),
      payload: '{}',
      qos: 1,
      messageId: 7,
    } as const;
    device.socket.write(mqttPacket.generate({ ...publish, dup: false, retain: false }));
    expect(await acknowledged).toEqual(Buffer.from([0x40, 2, 0, 7]));
    device.socket.destroy();
  });

  it('are held to the same packet limits', async () => {
    running = await startTestBroker({ tls: TEST_TLS });
    const device = await openTls(running.port);
    device.socket.on('error', () => undefined);
    device.socket.write(Buffer.from([0x10, 0xff, 0xff, 0xff, 0x7f]));
    await device.closed;
  });

  it('are not served plainly on the same port', async () => {
    running = await startTestBroker({ tls: TEST_TLS });
    const { createConnection } = await import('node:net');
    const socket = createConnection(running.port, '127.0.0.1');
    socket.on('error', () => undefined);
    const closed = new Promise<void>((resolve) => socket.once('close', () => resolve()));
    socket.on('data', () => undefined);
    socket.write(CONNECT);
    await closed;
    expect(running.received).toEqual([]);
  });
});
