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

/** The pump whose device it is, as far as a prime goes. */
export type Primer = { readonly primeSeconds: number; readonly programRpm: number };

const PRIME_RPM = 3200;
const SECOND_MS = 1000;
const EVERY_SECONDS = 10;
/** The rule speaks three minutes past the prime. */
const PAST_PRIME_SECONDS = 180;
/** What a pump draws that moves air, W. */
const DRY_WATTS = { prime: 430, program: 52 };

/**
 * A start that never carries load and has just become a failed prime: what went before is what the device had stored,
 * and the reading that tips it is of now.
 */
export async function failToPrime(device: PlayedDevice, { primeSeconds, programRpm }: Primer): Promise<void> {
  const now = Date.now();
  const seconds = primeSeconds + PAST_PRIME_SECONDS;
  const from = now - seconds * SECOND_MS;
  const readings: WireReading[] = [{ t: from - EVERY_SECONDS * SECOND_MS, rpm: 0, w: 6, src: 'off' }];
  for (let second = 0; second < seconds; second += EVERY_SECONDS) {
    const isPriming = second < primeSeconds;
    const jitter = (second / EVERY_SECONDS) % 3;
    readings.push({
      t: from + second * SECOND_MS,
      rpm: (isPriming ? PRIME_RPM : programRpm) + jitter,
      w: (isPriming ? DRY_WATTS.prime : DRY_WATTS.program) + jitter,
      src: isPriming ? 'prime' : 'program',
    });
  }
  await device.publish(readings);
  await device.publish([{ t: Date.now(), rpm: programRpm, w: DRY_WATTS.program, src: 'program' }]);
}
