import type pg from 'pg';
import type { Logger } from 'pino';
import type { DeviceMessage, ReceiveMessage, Settle } from '#server/broker/device-message.ts';
import { RAW_RETENTION_DAYS } from '#server/db/reading-partitions.ts';
import type { Notice } from '#shared/contract/mqtt/notice.ts';
import type { Arrival } from './arrival.ts';
import type { Batch } from './batch.ts';
import { decodeMessage } from './decode-message.ts';
import { storeBatch } from './ingest-repository.ts';
import type { KnownDevice } from './known-device.ts';
import { createLane, type Lane } from './lane.ts';
import { createNoticeBook } from './notice-book.ts';
import type { StoredMessage } from './stored-message.ts';

export type IngestOptions = {
  /** Connections of the machine role, one a lane at a time; a statement that takes 10 s has failed. */
  readonly pool: pg.Pool;
  readonly findDevice: (serial: string) => KnownDevice | undefined;
  readonly onStored: (messages: readonly StoredMessage[]) => void;
  /** Something of these pumps may have been stored without anybody hearing of it. */
  readonly onUncertain: (pumpIds: readonly string[]) => void;
  readonly sendNotice: (serial: string, notice: Notice) => void;
  readonly now: () => number;
  readonly log: Logger;
};

/** From the message to its committed rows. */
export type Ingest = {
  readonly receive: ReceiveMessage;
  /** Resolves when everything received is answered. */
  readonly drain: () => Promise<void>;
  readonly count: () => IngestCounts;
};

export type IngestCounts = { readonly readings: number; readonly refused: number; readonly waitingBytes: number };

/** Two writers keep two cores of PostgreSQL busy; more only fight over the index. */
const LANES = 2;
/** What may wait unread in all. Beyond it a message is handed back to its sender rather than kept. */
const MAX_WAITING_BYTES = 128 * 1024 * 1024;
const DAY_MS = 86_400_000;
const TOUCH_INTERVAL_MS = 60_000;

/** Nothing is stored before the first message. */
export function createIngest(options: IngestOptions): Ingest {
  const counts = { readings: 0, refused: 0 };
  const decode = createDecoder(options, counts);
  const lanes: readonly Lane[] = Array.from({ length: LANES }, () =>
    createLane({
      decode,
      now: options.now,
      store: (batch) => storeWith(options.pool, batch),
      onStored: (messages) => {
        for (const { readings } of messages) counts.readings += readings.length;
        options.onStored(messages);
      },
      onUnstorable: ({ device }, error) => options.log.error({ err: error, serial: device.serial }, 'message given up'),
      onUncertain: (arrivals, error) => {
        if (error !== undefined) {
          options.log.warn({ err: error, messages: arrivals.length }, 'storing readings failed, trying again');
        }
        options.onUncertain([...new Set(arrivals.flatMap(({ device }) => device.pump?.id ?? []))]);
      },
    }),
  );
  const waitingBytes = () => lanes.reduce((sum, lane) => sum + lane.waitingBytes(), 0);
  return {
    receive: (message, settle) => {
      if (waitingBytes() > MAX_WAITING_BYTES) settle(new Error('too much is waiting'));
      else lanes[laneOf(message.serial)]?.push(message, settle);
    },
    drain: async () => {
      await Promise.all(lanes.map((lane) => lane.drain()));
    },
    count: () => ({ ...counts, waitingBytes: waitingBytes() }),
  };
}

async function storeWith(pool: pg.Pool, batch: Batch) {
  const client = await pool.connect();
  try {
    const stored = await storeBatch(client, batch.toInput());
    client.release();
    return stored;
  } catch (error) {
    // The statement's outcome is unknown or the connection is broken: the next try starts on a new one.
    client.release(true);
    throw error;
  }
}

/** A device keeps its lane for ever: that is what keeps its messages in order. */
function laneOf(serial: string): number {
  let sum = 0;
  for (let index = 0; index < serial.length; index += 1) sum = (sum * 31 + serial.charCodeAt(index)) | 0;
  return Math.abs(sum) % LANES;
}

function createDecoder(options: IngestOptions, counts: { refused: number }) {
  const touchedAt = new Map<string, number>();
  const notice = createNoticeBook();
  return (message: DeviceMessage, settle: Settle): Arrival | undefined => {
    const { serial, receivedAt } = message;
    const device = options.findDevice(serial);
    if (device === undefined) return undefined;
    const today = receivedAt - (receivedAt % DAY_MS);
    const decoded = decodeMessage(message, device, today - RAW_RETENTION_DAYS * DAY_MS);
    if (decoded.refusal !== undefined) {
      counts.refused += decoded.refusal.count;
      const due = notice(serial, decoded.refusal.count, decoded.refusal.reason, receivedAt);
      if (due !== undefined) options.sendNotice(serial, due);
    }
    const isWill = decoded.status?.state === 'lost';
    const touchesDevice = !isWill && receivedAt - (touchedAt.get(serial) ?? 0) >= TOUCH_INTERVAL_MS;
    if (touchesDevice) touchedAt.set(serial, receivedAt);
    // A device that speaks after its will is there again, from its first word on.
    if (isWill) touchedAt.delete(serial);
    return { device, receivedAt, decoded, touchesDevice, settle };
  };
}
