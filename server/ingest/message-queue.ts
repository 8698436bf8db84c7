import type { DeviceMessage, Settle } from '#server/broker/device-message.ts';

/** A message that nobody has looked into yet, with its unanswered callback. */
export type WaitingMessage = { readonly message: DeviceMessage; readonly settle: Settle };

/** First in, first out, in constant time, with its size in bytes. */
export type MessageQueue = {
  readonly push: (waiting: WaitingMessage) => void;
  readonly shift: () => WaitingMessage | undefined;
  readonly bytes: () => number;
};

/** Below this many answered places an array is not worth compacting. */
const COMPACT_FROM = 1024;

/** An empty queue. */
export function createMessageQueue(): MessageQueue {
  let items: WaitingMessage[] = [];
  let head = 0;
  let bytes = 0;
  return {
    bytes: () => bytes,
    push: (waiting) => {
      items.push(waiting);
      bytes += waiting.message.payload.length;
    },
    shift: () => {
      const first = items[head];
      if (first === undefined) return undefined;
      head += 1;
      bytes -= first.message.payload.length;
      if (head >= COMPACT_FROM && head * 2 >= items.length) {
        items = items.slice(head);
        head = 0;
      }
      return first;
    },
  };
}
