import { encodeReadings } from '#shared/contract/mqtt/encode-reading.ts';
import type { Reading } from '#shared/contract/mqtt/readings.ts';
import { MAX_READINGS_PER_MESSAGE } from '#shared/contract/mqtt/wire-limits.ts';

/**
 * Readings on their way out of a device. A message stays here until it is acknowledged; what was not acknowledged when
 * the connection went goes back to the front, in its order. When the store is full the oldest go.
 */
export type Outgoing = {
  readonly add: (reading: Reading) => void;
  /** The next message to send, or undefined when nothing waits or enough is under way. */
  readonly next: () => OutgoingMessage | undefined;
  readonly acknowledge: (message: OutgoingMessage) => void;
  readonly takeBack: () => void;
  readonly waiting: () => number;
};

export type OutgoingMessage = { readonly payload: string; readonly readings: readonly Reading[] };

/** Readings kept while nobody takes them: half a day at one every ten seconds. */
const STORE_LIMIT = 4320;
/** Messages sent and not yet acknowledged. */
const IN_FLIGHT_LIMIT = 8;

export function createOutgoing(): Outgoing {
  let waiting: Reading[] = [];
  let inFlight: OutgoingMessage[] = [];
  const trim = () => {
    if (waiting.length > STORE_LIMIT) waiting = waiting.slice(-STORE_LIMIT);
  };
  return {
    add: (reading) => {
      waiting.push(reading);
      trim();
    },
    next: () => {
      if (waiting.length === 0 || inFlight.length >= IN_FLIGHT_LIMIT) return undefined;
      const readings = waiting.splice(0, MAX_READINGS_PER_MESSAGE);
      const message = { payload: encodeReadings(readings), readings };
      inFlight.push(message);
      return message;
    },
    acknowledge: (message) => {
      inFlight = inFlight.filter((other) => other !== message);
    },
    takeBack: () => {
      waiting = [...inFlight.flatMap((message) => message.readings), ...waiting];
      inFlight = [];
      trim();
    },
    waiting: () => waiting.length,
  };
}
