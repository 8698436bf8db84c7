import type { StoredMessage } from '#server/ingest/stored-message.ts';

/** Stored messages that wait to be folded, first in, first out. */
export type FoldQueue = {
  readonly push: (message: StoredMessage) => void;
  /** Takes messages from the front until they hold this many readings or events. */
  readonly take: (events: number) => StoredMessage[];
  readonly events: () => number;
  readonly isEmpty: () => boolean;
  /** Arrival of the oldest message, ms. */
  readonly oldest: () => number | undefined;
};

/** An empty queue. */
export function createFoldQueue(): FoldQueue {
  let items: StoredMessage[] = [];
  let head = 0;
  let events = 0;
  const sizeOf = (message: StoredMessage) => Math.max(1, message.readings.length);
  return {
    push: (message) => {
      items.push(message);
      events += sizeOf(message);
    },
    take: (most) => {
      const from = head;
      let taken = 0;
      for (let item = items[head]; item !== undefined && taken < most; item = items[head]) {
        taken += sizeOf(item);
        head += 1;
      }
      events -= taken;
      const messages = items.slice(from, head);
      if (head === items.length) items = [];
      else if (head > 4096) items = items.slice(head);
      else return messages;
      head = 0;
      return messages;
    },
    events: () => events,
    isEmpty: () => head === items.length,
    oldest: () => items[head]?.receivedAt,
  };
}
