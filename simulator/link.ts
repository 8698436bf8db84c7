import { createHash } from 'node:crypto';
import { connect, type IClientOptions } from 'mqtt';
import { buildTopic, shardFromDigestByte, type TopicKind } from '#shared/contract/mqtt/topics.ts';

export type ConnectionOptions = {
  readonly port: number;
  readonly serial: string;
  readonly secret: string;
  /** The payload of `…/status` that the broker publishes when the connection dies. */
  readonly will: string;
  readonly onOpen: () => void;
  readonly onClosed: () => void;
  /** The broker knows no such device or secret. */
  readonly onRefused: (reason: string) => void;
  readonly onNotice: (payload: string) => void;
};

/** One connection of one device, which lives once: whoever wants another opens another. */
export type Connection = {
  /** Publishes at QoS 1 below the device's own prefix; `onStored` is called at the PUBACK. */
  readonly publish: (kind: TopicKind, payload: string, onStored?: () => void) => void;
  /** Cuts the wire, as a router does that loses its power: the broker publishes the will. */
  readonly cut: () => void;
  /** Says goodbye, so that no will is published. */
  readonly end: () => Promise<void>;
};

export type OpenConnection = (options: ConnectionOptions) => Connection;

const KEEP_ALIVE_SECONDS = 120;
/** Return codes of CONNACK: bad user name or password, not authorized (MQTT 3.1.1, table 3.1). */
const REFUSED_CODES: readonly (string | number | undefined)[] = [4, 5];

/** Opens a connection to a broker on loopback: MQTT 3.1.1, clean session, the serial as client id and user name. */
export const openConnection: OpenConnection = (options) => {
  const { serial } = options;
  const topic = topicsOf(serial);
  const client = connect(`mqtt://127.0.0.1:${options.port}`, {
    clientId: serial,
    username: serial,
    password: options.secret,
    clean: true,
    keepalive: KEEP_ALIVE_SECONDS,
    protocolVersion: 4,
    reconnectPeriod: 0,
    connectTimeout: 15_000,
    will: { topic: topic('status'), payload: Buffer.from(options.will), qos: 1, retain: false },
  } satisfies IClientOptions);
  client.on('connect', () => {
    client.subscribe(topic('notice'), { qos: 1 });
    options.onOpen();
  });
  client.on('message', (_, payload) => options.onNotice(payload.toString()));
  client.on('error', (error: Error & { readonly code?: string | number }) => {
    if (REFUSED_CODES.includes(error.code)) options.onRefused(error.message);
  });
  client.once('close', () => {
    client.end(true);
    options.onClosed();
  });
  return {
    publish: (kind, payload, onStored) => {
      client.publish(topic(kind), payload, { qos: 1 }, (error) => {
        if (!error) onStored?.();
      });
    },
    cut: () => {
      client.stream.destroy();
    },
    end: () => client.endAsync().catch(() => undefined),
  };
};

/** A device's topics; the shard is computed from the serial's digest. */
function topicsOf(serial: string): (kind: TopicKind) => string {
  const shard = shardFromDigestByte(createHash('sha256').update(serial).digest()[0] ?? 0);
  return (kind) => buildTopic({ shard, serial, kind });
}
