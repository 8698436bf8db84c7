import type { Client } from 'aedes';
import { DEVICE_RATE } from '#shared/contract/mqtt/wire-limits.ts';
import { createDevicePace } from './device-pace.ts';
import { createPacedQueue, type PacedQueue } from './paced-queue.ts';
import { type DeviceTopics, topicsOfDevice } from './topic-rules.ts';

/** One signed-in connection. */
export type ConnectedDevice = {
  readonly serial: string;
  readonly client: Client;
  readonly topics: DeviceTopics;
  readonly queue: PacedQueue;
  listensToNotice: boolean;
};

/** Under one and a half of the shortest keep-alive (90 s): a device that is only slowed keeps its connection. */
const LONGEST_WAIT_MS = 30_000;

/** The state of a connection that has just signed in. */
export function createConnectedDevice(serial: string, client: Client, now: () => number): ConnectedDevice {
  const { messagesPerSecond, burst } = DEVICE_RATE;
  const pace = createDevicePace({ messagesPerSecond, burst, longestWaitMs: LONGEST_WAIT_MS }, now());
  return {
    serial,
    client,
    topics: topicsOfDevice(serial),
    queue: createPacedQueue(pace, now),
    listensToNotice: false,
  };
}
