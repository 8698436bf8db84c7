import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { connectAsync, type MqttClient } from 'mqtt';
import { shardOfSerial } from '#server/broker/shard-of-serial.ts';
import type { Reading } from '#shared/contract/mqtt/readings.ts';
import { buildTopic, type TopicKind } from '#shared/contract/mqtt/topics.ts';
import type { Product } from './product.ts';

type WireReading = {
  readonly t: number;
  readonly rpm: number;
  readonly w: number;
  readonly src?: Reading['reportedSource'];
};

/** A device of the demo company that nobody simulates: the test says what it says. */
export type PlayedDevice = {
  /** Resolves when every one of them is stored; goes on trying across a server that dies. */
  readonly publish: (readings: readonly WireReading[]) => Promise<void>;
  readonly end: () => Promise<void>;
};

/** Comes back soon: the tests wait for it. */
const RECONNECT_MS = 250;

/** Connects as the device with this serial, by the secret that the start left in the data folder. */
export async function playDevice({ dataFolder, mqttPort }: Product, serial: string): Promise<PlayedDevice> {
  const topicOf = (kind: TopicKind) => buildTopic({ shard: shardOfSerial(serial), serial, kind });
  const connection = crypto.randomUUID();
  const client: MqttClient = await connectAsync(`mqtt://127.0.0.1:${mqttPort}`, {
    clientId: serial,
    username: serial,
    password: findSecret(dataFolder, serial),
    clean: true,
    keepalive: 60,
    reconnectPeriod: RECONNECT_MS,
    will: {
      topic: topicOf('status'),
      payload: Buffer.from(JSON.stringify({ state: 'lost', conn: connection })),
      qos: 1,
      retain: false,
    },
  });
  client.on('error', () => undefined);
  let isEnded = false;
  const say = async (kind: TopicKind, message: unknown): Promise<void> => {
    const payload = JSON.stringify(message);
    for (;;) {
      try {
        await client.publishAsync(topicOf(kind), payload, { qos: 1 });
        return;
      } catch (error) {
        // Refused in the moment in which the connection broke: said again on the next one.
        if (isEnded) throw error;
        if (!client.connected) await new Promise<void>((resolve) => client.once('connect', () => resolve()));
      }
    }
  };
  await say('status', { state: 'online', conn: connection, boot: crypto.randomUUID(), up: 60, fw: '1.4.2' });
  return {
    publish: (readings) =>
      say(
        'readings',
        readings.map((reading) => ({ in: 0, act: 0, ...reading })),
      ),
    end: async () => {
      isEnded = true;
      await client.endAsync(true);
    },
  };
}

function findSecret(dataFolder: string, serial: string): string {
  const { devices } = JSON.parse(readFileSync(join(dataFolder, 'demo-devices.json'), 'utf8')) as {
    devices: { serial: string; secret: string }[];
  };
  const device = devices.find((each) => each.serial === serial);
  if (device === undefined) throw new Error(`no device ${serial}`);
  return device.secret;
}

const SECOND_MS = 1000;
const PRIME_SECONDS = 180;
const UNLOADED_SECONDS = 480;
const EVERY_SECONDS = 10;
/** What a pump draws that moves air, W. */
const DRY_WATTS = 210;

/**
 * What a device has stored of a start that never carried load: three minutes of prime, then its program's speed on
 * air until `until`, ms. Told in one message it is a failed prime at once.
 */
export function tellFailedPrime(until: number, programRpm: number): WireReading[] {
  const from = until - UNLOADED_SECONDS * SECOND_MS;
  const standing = [{ t: from - EVERY_SECONDS * SECOND_MS, rpm: 0, w: 6, src: 'off' as const }];
  const count = UNLOADED_SECONDS / EVERY_SECONDS;
  return [
    ...standing,
    ...Array.from({ length: count + 1 }, (_, index) => {
      const isPriming = index * EVERY_SECONDS < PRIME_SECONDS;
      const jitter = index % 3;
      return isPriming
        ? { t: from + index * EVERY_SECONDS * SECOND_MS, rpm: 3200 + jitter, w: 430 + jitter, src: 'prime' as const }
        : {
            t: from + index * EVERY_SECONDS * SECOND_MS,
            rpm: programRpm + jitter,
            w: DRY_WATTS / 4 + jitter,
            src: 'program' as const,
          };
    }),
  ];
}
