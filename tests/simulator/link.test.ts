import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { type AddressInfo, createServer, type Server } from 'node:net';
import { Aedes, type AedesPublishPacket, type AuthenticateError } from 'aedes';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { buildTopic, shardFromDigestByte } from '#shared/contract/mqtt/topics.ts';
import { type Connection, openConnection } from '#simulator/link.ts';

const SERIAL = 'MR-000101';
const prefix = (kind: 'readings' | 'status' | 'notice') =>
  buildTopic({
    shard: shardFromDigestByte(createHash('sha256').update(SERIAL).digest()[0] ?? 0),
    serial: SERIAL,
    kind,
  });

let broker: Aedes;
let server: Server;
let port: number;
const connections: Connection[] = [];

beforeEach(async () => {
  broker = await Aedes.createBroker();
  broker.authenticate = (client, username, password, callback) => {
    const known = client.id === SERIAL && username === SERIAL && password?.toString() === 'right';
    if (known) callback(null, true);
    else callback(Object.assign(new Error('no such device'), { returnCode: 5 }) as AuthenticateError, null);
  };
  server = createServer(broker.handle).listen(0, '127.0.0.1');
  await once(server, 'listening');
  port = (server.address() as AddressInfo).port;
});

afterEach(async () => {
  await Promise.all(connections.splice(0).map((connection) => connection.end()));
  await new Promise<void>((resolve) => broker.close(resolve));
  await new Promise((resolve) => server.close(resolve));
});

/** Opens a connection and resolves with what happens first. */
function open(secret: string) {
  const notices: string[] = [];
  let close: () => void = () => undefined;
  const closed = new Promise<void>((resolve) => {
    close = resolve;
  });
  const result = new Promise<{
    connection: Connection;
    notices: string[];
    closed: Promise<void>;
    refused: string | undefined;
  }>((resolve) => {
    const settle = (refused?: string) => queueMicrotask(() => resolve({ connection, notices, closed, refused }));
    const connection = openConnection({
      port,
      serial: SERIAL,
      secret,
      will: '{"state":"lost"}',
      onOpen: () => settle(),
      onRefused: settle,
      onClosed: () => close(),
      onNotice: (payload) => void notices.push(payload),
    });
    connections.push(connection);
  });
  return result;
}

/** The first packet on a topic from now on. */
const published = (topic: string) =>
  new Promise<AedesPublishPacket>((resolve) => {
    broker.on('publish', (packet) => {
      if (packet.topic === topic) resolve(packet);
    });
  });

describe('a connection to a real broker', () => {
  it('publishes below its own prefix at QoS 1 and hears when it is stored', async () => {
    const { connection } = await open('right');
    const seen = published(prefix('readings'));
    const stored = new Promise<void>((resolve) => connection.publish('readings', '{"t":1}', resolve));

    expect(await seen).toMatchObject({ qos: 1, retain: false, payload: Buffer.from('{"t":1}') });
    await stored;
  });

  it('leaves its will when the wire is cut, and none when it says goodbye', async () => {
    const first = await open('right');
    const will = published(prefix('status'));
    first.connection.cut();
    expect((await will).payload.toString()).toBe('{"state":"lost"}');
    await first.closed;

    const second = await open('right');
    const seen: string[] = [];
    broker.on('publish', (packet) => void seen.push(packet.topic));
    await second.connection.end();
    await second.closed;
    expect(seen.filter((topic) => topic.endsWith('/status'))).toEqual([]);
  });

  it('hears its notices', async () => {
    const subscribed = once(broker, 'subscribe');
    const { notices } = await open('right');
    await subscribed;
    broker.publish(
      {
        cmd: 'publish',
        topic: prefix('notice'),
        payload: Buffer.from('{"bad":1,"reason":"x"}'),
        qos: 0,
        dup: false,
        retain: false,
      },
      () => undefined,
    );

    await expect.poll(() => notices).toEqual(['{"bad":1,"reason":"x"}']);
  });

  it('tells a refusal from a lost line', async () => {
    const { refused, closed } = await open('wrong');

    expect(refused).toMatch(/not authorized/i);
    await closed;
  });
});
