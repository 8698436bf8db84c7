import { randomUUID } from 'node:crypto';
import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { openRawDevice, type RawDevice, topicOf } from '#tests/support/test-broker.ts';

/**
 * A device that keeps every reading until it is acknowledged, as the wire asks for: after a break it connects again
 * and sends what was not acknowledged from the oldest on.
 */
export type StubbornDevice = {
  /** Device times of the readings that were acknowledged. */
  readonly acknowledged: ReadonlySet<number>;
  /** How often it had to connect again, and how many readings it sent a second time. */
  readonly trouble: () => { readonly reconnects: number; readonly sentAgain: number };
  /** Resolves when everything is acknowledged. */
  readonly finished: Promise<void>;
  readonly stop: () => void;
};

type Login = { readonly serial: string; readonly secret: string };

const UNDER_WAY = 5;
const BEFORE_CONNECTING_AGAIN_MS = 150;

/** Sends one reading a message, no faster than `everyMs` a message, to whoever listens on the port. */
export function startStubbornDevice(
  port: number,
  login: Login,
  readings: readonly Reading[],
  { everyMs }: { readonly everyMs: number },
): StubbornDevice {
  const acknowledged = new Set<number>();
  const sent = new Set<number>();
  const counts = { reconnects: -1, sentAgain: 0 };
  let stopped = false;

  const playOnce = async (device: RawDevice): Promise<void> => {
    let next = readings.findIndex(({ at }) => !acknowledged.has(at));
    const underWay = new Map<number, number>();
    const send = (reading: Reading, messageId: number): void => {
      counts.sentAgain += sent.has(reading.at) ? 1 : 0;
      sent.add(reading.at);
      underWay.set(messageId, reading.at);
      const topic = topicOf(login.serial, 'readings');
      device.send({
        cmd: 'publish',
        topic,
        payload: encodeReadings([reading]),
        qos: 1,
        messageId,
        dup: false,
        retain: false,
      });
    };
    while (next < readings.length || underWay.size > 0) {
      if (stopped) return;
      const reading = readings[next];
      if (reading !== undefined && underWay.size < UNDER_WAY) {
        next += 1;
        send(reading, next);
        await wait(everyMs);
        continue;
      }
      const { messageId } = (await device.next('puback')) as { messageId: number };
      const at = underWay.get(messageId);
      underWay.delete(messageId);
      if (at !== undefined) acknowledged.add(at);
    }
  };
  const play = async (): Promise<void> => {
    while (!stopped && acknowledged.size < readings.length) {
      counts.reconnects += 1;
      try {
        const device = await connect(port, login);
        await playOnce(device);
        device.socket.destroy();
      } catch {
        await wait(BEFORE_CONNECTING_AGAIN_MS);
      }
    }
  };
  return {
    acknowledged,
    trouble: () => counts,
    finished: play(),
    stop: () => {
      stopped = true;
    },
  };
}

async function connect(port: number, { serial, secret }: Login): Promise<RawDevice> {
  const device = await openRawDevice(port, serial, { password: Buffer.from(secret) });
  const answer = (await device.next('connack')) as { returnCode: number };
  if (answer.returnCode !== 0) throw new Error(`refused with code ${answer.returnCode}`);
  const online = { state: 'online', conn: randomUUID(), boot: '7d1f4f0e-2f0a-4d3b-9a54-0d6d9a1f3c11', up: 60, fw: '1' };
  const topic = topicOf(serial, 'status');
  device.send({
    cmd: 'publish',
    topic,
    payload: JSON.stringify(online),
    qos: 1,
    messageId: 65_000,
    dup: false,
    retain: false,
  });
  await device.next('puback');
  return device;
}

const wait = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));
