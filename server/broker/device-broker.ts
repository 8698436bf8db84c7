import type { Server, Socket } from 'node:net';
import { Aedes, type Client, type Subscription } from 'aedes';
import type { Logger } from 'pino';
import { encodeNotice, type Notice } from '#shared/contract/mqtt/notice.ts';
import { PUBLISH_QOS } from '#shared/contract/mqtt/wire-limits.ts';
import type { DeviceCredential } from './device-credential.ts';
import type { ReceiveMessage } from './device-message.ts';
import { createDeviceRegistry, type DeviceRegistry } from './device-registry.ts';
import { createDeviceServer, listen } from './listen-for-devices.ts';
import { createRefusalLog, type RefusalLog } from './refusal-log.ts';
import { createSignIn } from './sign-in.ts';
import { skipRouting } from './skip-routing.ts';
import { createTakePublish } from './take-publish.ts';

export type DeviceBrokerOptions = {
  readonly host: string;
  /** 0 = any free port. */
  readonly port: number;
  /** PEM texts; without them only a loopback host is served. */
  readonly tls: { readonly key: string; readonly certificate: string } | undefined;
  readonly deviceKey: Buffer | string;
  /** Finds a device by its serial; rejects when that cannot be known now. */
  readonly findCredential: (serial: string) => Promise<DeviceCredential | undefined>;
  readonly receive: ReceiveMessage;
  readonly onSignedIn?: (serial: string) => void;
  readonly now: () => number;
  readonly log: Logger;
  readonly maxConnections?: number;
  /** Sockets that may be open at once before anybody signed in on them. */
  readonly maxWaitingForSignIn?: number;
};

/** The door of the devices. Nothing listens before `start`. */
export type DeviceBroker = {
  /** Answers the port that was taken. */
  readonly start: () => Promise<number>;
  /** Takes no connection and no message any more; what was received before can still be settled. */
  readonly quiesce: () => void;
  readonly stop: () => Promise<void>;
  /** Closes a device's open connection, if it has one: its secret was rotated or revoked. */
  readonly closeDevice: (serial: string) => void;
  /** Sends a notice to a device if it listens for it. */
  readonly sendNotice: (serial: string, notice: Notice) => void;
  readonly listSerials: () => string[];
  readonly countConnected: () => number;
};

const CONNECT_TIMEOUT_MS = 10_000;
const MAX_CONNECTIONS = 20_000;
/** Each may hold one small packet: together some 25 MB at most. */
const MAX_WAITING_FOR_SIGN_IN = 6_000;

/** Makes the broker; every rule it enforces is in the files beside this one. */
export function createDeviceBroker(options: DeviceBrokerOptions): DeviceBroker {
  const registry = createDeviceRegistry();
  const sayRefused = createRefusalLog(options.log, options.now);
  let quiet = false;
  const sockets = new Set<Socket>();
  let server: Server | undefined;
  let broker: Aedes | undefined;
  const isQuiet = () => quiet;
  return {
    start: async () => {
      broker = await createAedes(options, registry, sayRefused, isQuiet);
      server = createServerFor(options, broker, { registry, sockets, sayRefused });
      return listen(server, options.host, options.port);
    },
    quiesce: () => {
      quiet = true;
      server?.close();
    },
    stop: async () => {
      quiet = true;
      server?.close();
      await new Promise<void>((resolve) => (broker === undefined ? resolve() : broker.close(resolve)));
      for (const socket of sockets) socket.destroy();
    },
    closeDevice: (serial) => registry.findBySerial(serial)?.client.close(),
    sendNotice: (serial, notice) => sendNotice(registry, serial, notice),
    listSerials: registry.listSerials,
    countConnected: registry.count,
  };
}

async function createAedes(
  options: DeviceBrokerOptions,
  registry: DeviceRegistry,
  sayRefused: RefusalLog,
  isQuiet: () => boolean,
): Promise<Aedes> {
  const { now, log } = options;
  const broker = await Aedes.createBroker({
    connectTimeout: CONNECT_TIMEOUT_MS,
    ...createSignIn({ ...options, onSignedIn: options.onSignedIn ?? (() => undefined), registry, isQuiet, sayRefused }),
    authorizePublish: createTakePublish({ registry, receive: options.receive, now, isQuiet, sayRefused }),
    authorizeSubscribe: (client, subscription, callback) =>
      callback(null, allowSubscription(registry, client, subscription, sayRefused) ? subscription : null),
  });
  skipRouting(broker);
  broker.on('clientError', (client, error) =>
    log.debug({ serial: client.id, reason: error.message }, 'device connection failed'),
  );
  broker.on('connectionError', (_client, error) =>
    log.debug({ reason: error.message }, 'connection failed before sign-in'),
  );
  return broker;
}

/** A device may subscribe to its own notice topic and to nothing else. */
function allowSubscription(
  registry: DeviceRegistry,
  client: Client,
  subscription: Subscription,
  sayRefused: RefusalLog,
): boolean {
  const device = registry.findByClient(client);
  if (device !== undefined && subscription.topic === device.topics.notice) {
    device.listensToNotice = true;
    return true;
  }
  sayRefused('subscription-foreign', { serial: device?.serial, topic: subscription.topic.slice(0, 100) });
  return false;
}

type Connections = {
  readonly registry: DeviceRegistry;
  readonly sockets: Set<Socket>;
  readonly sayRefused: RefusalLog;
};

function createServerFor(options: DeviceBrokerOptions, broker: Aedes, connections: Connections): Server {
  const { registry, sockets, sayRefused } = connections;
  const limit = options.maxWaitingForSignIn ?? MAX_WAITING_FOR_SIGN_IN;
  return createDeviceServer({
    host: options.host,
    tls: options.tls,
    maxConnections: options.maxConnections ?? MAX_CONNECTIONS,
    onRefused: (reason, address) => sayRefused(reason, { address }),
    onSocket: (socket) => {
      if (sockets.size - registry.count() >= limit) {
        sayRefused('too-many-waiting', { address: socket.remoteAddress });
        socket.destroy();
        return;
      }
      sockets.add(socket);
      const client = broker.handle(socket);
      socket.once('close', () => {
        sockets.delete(socket);
        registry.findByClient(client)?.queue.flush();
        registry.remove(client);
      });
    },
  });
}

function sendNotice(registry: DeviceRegistry, serial: string, notice: Notice): void {
  const device = registry.findBySerial(serial);
  if (device === undefined || !device.listensToNotice || device.client.closed) return;
  const payload = Buffer.from(encodeNotice(notice));
  device.client.publish(
    { cmd: 'publish', topic: device.topics.notice, payload, qos: PUBLISH_QOS, retain: false, dup: false },
    // A notice is a courtesy: a device that is gone by now asks again by sending.
    () => undefined,
  );
}
