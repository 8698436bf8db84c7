import type { DeviceMessage, Settle } from '#server/broker/device-message.ts';
import type { Arrival } from './arrival.ts';
import { type Batch, createBatch } from './batch.ts';
import { createMessageQueue } from './message-queue.ts';
import { type StoreArrivalsOptions, storeArrivals } from './store-arrivals.ts';
import type { StoredMessage } from './stored-message.ts';

export type LaneOptions = StoreArrivalsOptions & {
  /** Decodes a message; undefined when its device is not known any more. */
  readonly decode: (message: DeviceMessage, settle: Settle) => Arrival | undefined;
  /** What was committed, in order, just before it is acknowledged. */
  readonly onStored: (messages: readonly StoredMessage[]) => void;
  /** The database did not say whether it stored these; `error` is undefined once it has them for certain. */
  readonly onUncertain: (arrivals: readonly Arrival[], error: unknown) => void;
  readonly now: () => number;
};

/**
 * One writer. Messages of a device always take the same lane, are stored in order and acknowledged in order. While one
 * batch is being committed the next one gathers, so that the batch grows with the load and needs no timer. At most one
 * batch is decoded ahead: everything else waits as it came, its callback unanswered, which closes the sender's window.
 */
export type Lane = {
  readonly push: (message: DeviceMessage, settle: Settle) => void;
  readonly waitingBytes: () => number;
  /** Resolves when everything that was pushed is answered. */
  readonly drain: () => Promise<void>;
};

/** A message that has waited this long is handed back to its sender: well under one and a half of any keep-alive. */
const LONGEST_HOLD_MS = 30_000;
const RETRY_MS = 250;

/** An idle lane. */
export function createLane(options: LaneOptions): Lane {
  const queue = createMessageQueue();
  let next = createBatch();
  let carried: Arrival | undefined;
  let working: Promise<void> | undefined;

  const fill = (): void => {
    for (;;) {
      const arrival = carried ?? decodeNext();
      carried = undefined;
      if (arrival === undefined) return;
      if (!next.hasRoomFor(arrival)) {
        carried = arrival;
        return;
      }
      next.add(arrival);
    }
  };
  const decodeNext = (): Arrival | undefined => {
    for (let waiting = queue.shift(); waiting !== undefined; waiting = queue.shift()) {
      const arrival = options.decode(waiting.message, waiting.settle);
      if (arrival !== undefined) return arrival;
      waiting.settle(new Error('the device is not known any more'));
    }
    return undefined;
  };
  const work = async (): Promise<void> => {
    // What arrives in the same turn of the event loop travels together.
    await new Promise((resolve) => setImmediate(resolve));
    for (fill(); !next.isEmpty(); fill()) {
      const batch = next;
      next = createBatch();
      const storing = storeAndSettle(options, batch);
      fill();
      await storing;
    }
    working = undefined;
  };

  return {
    waitingBytes: queue.bytes,
    push: (message, settle) => {
      queue.push({ message, settle });
      if (carried === undefined) fill();
      working ??= work();
    },
    drain: async () => {
      while (working !== undefined) await working;
    },
  };
}

async function storeAndSettle(options: LaneOptions, batch: Batch): Promise<void> {
  const { arrivals } = batch;
  const oldest = Math.min(...arrivals.map(({ receivedAt }) => receivedAt));
  for (let failures = 0; ; failures += 1) {
    try {
      const stored = await storeArrivals(options, batch);
      // What an earlier try stored unheard was old news to this one.
      if (failures > 0) options.onUncertain(arrivals, undefined);
      options.onStored(stored);
      for (const { settle } of arrivals) settle();
      return;
    } catch (error) {
      options.onUncertain(arrivals, error);
      if (options.now() - oldest > LONGEST_HOLD_MS) {
        for (const { settle } of arrivals) settle(error instanceof Error ? error : new Error('not stored'));
        return;
      }
    }
    await new Promise((resolve) => setTimeout(resolve, RETRY_MS));
  }
}
