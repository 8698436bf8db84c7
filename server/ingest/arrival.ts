import type { Settle } from '#server/broker/device-message.ts';
import type { DecodedMessage } from './decode-message.ts';
import type { KnownDevice } from './known-device.ts';

/** A decoded message on its way into the database. */
export type Arrival = {
  readonly device: KnownDevice;
  readonly receivedAt: number;
  readonly decoded: DecodedMessage;
  /** Write the device's `heard_at` with it; not every message does, once a minute is enough. */
  readonly touchesDevice: boolean;
  readonly settle: Settle;
};

/** Rows that a message takes of a batch: its readings, and one for an event. */
export function countRows({ readings, status, settings }: DecodedMessage): number {
  return readings.length + (status === undefined && settings === undefined ? 0 : 1);
}
