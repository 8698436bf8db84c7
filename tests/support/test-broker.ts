import { connect as connectSocket, type Socket } from 'node:net';
import mqttPacket, { type Packet } from 'mqtt-packet';
import pino from 'pino';
import { createDeviceBroker, type DeviceBroker, type DeviceBrokerOptions } from '#server/broker/device-broker.ts';
import { hashDeviceSecret } from '#server/broker/device-credential.ts';
import type { DeviceMessage, Settle } from '#server/broker/device-message.ts';
import { shardOfSerial } from '#server/broker/shard-of-serial.ts';
import { buildTopic, type TopicKind } from '#shared/contract/mqtt/topics.ts';

export const BROKER_TEST_KEY = 'a key for devices of tests, long enough';
export const SECRET = 'secret-of-every-device-in-broker-tests';

export type Received = { readonly message: DeviceMessage; readonly settle: Settle };

export type TestBroker = {
  readonly broker: DeviceBroker;
  readonly port: number;
  readonly received: Received[];
  /** Resolves when as many messages have been received. */
  readonly waitFor: (count: number) => Promise<readonly Received[]>;
};

/** A broker on a free port that knows every serial and settles nothing by itself unless told to. */
export async function startTestBroker(
  options: Partial<DeviceBrokerOptions> & { readonly settleAtOnce?: boolean } = {},
): Promise<TestBroker> {
  const received: Received[] = [];
  const waiting: { count: number; resolve: (received: readonly Received[]) => void }[] = [];
  const broker = createDeviceBroker({
    host: '127.0.0.1',
    port: 0,
    tls: undefined,
    deviceKey: BROKER_TEST_KEY,
    findCredential: async (serial) => ({ serial, secretHash: hashDeviceSecret(BROKER_TEST_KEY, SECRET) }),
    receive: (message, settle) => {
      received.push({ message, settle });
      if (options.settleAtOnce ?? true) settle();
      for (const one of waiting.splice(0)) {
        if (received.length >= one.count) one.resolve(received);
        else waiting.push(one);
      }
    },
    now: Date.now,
    log: pino({ level: 'silent' }),
    ...options,
  });
  const port = await broker.start();
  const waitFor = (count: number) =>
    new Promise<readonly Received[]>((resolve) => {
      if (received.length >= count) resolve(received);
      else waiting.push({ count, resolve });
    });
  return { broker, port, received, waitFor };
}

export const topicOf = (serial: string, kind: TopicKind) => buildTopic({ shard: shardOfSerial(serial), serial, kind });

/** A connection that speaks single MQTT packets, for what no well-behaved client does. */
export type RawDevice = {
  readonly socket: Socket;
  readonly send: (packet: Packet) => void;
  /** The next packet of this command that the broker sends; those of other commands before it are skipped. */
  readonly next: (command: Packet['cmd']) => Promise<Packet>;
  readonly closed: Promise<void>;
};

/** Opens a connection; with a serial it signs in, otherwise nothing is sent. */
export async function openRawDevice(port: number, serial?: string, change: object = {}): Promise<RawDevice> {
  const socket = connectSocket(port, '127.0.0.1');
  const parser = mqttPacket.parser({ protocolVersion: 4 });
  const arrived: Packet[] = [];
  let wake: () => void = () => undefined;
  socket.on('data', (chunk) => parser.parse(chunk));
  parser.on('packet', (packet) => {
    arrived.push(packet);
    wake();
  });
  const closed = new Promise<void>((resolve) => socket.once('close', () => resolve()));
  socket.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    socket.once('connect', () => resolve());
    socket.once('close', () => reject(new Error('nobody listens')));
  });
  const send = (packet: Packet) => void socket.write(mqttPacket.generate(packet));
  const next = async (command: Packet['cmd']): Promise<Packet> => {
    for (;;) {
      const place = arrived.findIndex(({ cmd }) => cmd === command);
      if (place >= 0) return arrived.splice(0, place + 1).at(-1)!;
      const news = new Promise<void>((resolve) => {
        wake = resolve;
      });
      if ((await Promise.race([news.then(() => 'news'), closed.then(() => 'closed')])) === 'closed') {
        throw new Error(`closed while waiting for ${command}`);
      }
    }
  };
  if (serial !== undefined) {
    const packet = { cmd: 'connect' as const, clientId: serial, username: serial, password: Buffer.from(SECRET) };
    send({ ...packet, keepalive: 60, clean: true, protocolVersion: 4, protocolId: 'MQTT', ...change });
  }
  return { socket, send, next, closed };
}
