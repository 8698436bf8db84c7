export type PaceLimits = {
  readonly messagesPerSecond: number;
  readonly burst: number;
  /** A message that would have to wait longer is refused, ms. */
  readonly longestWaitMs: number;
};

/** Takes one message at an instant (ms): how long it has to wait, or that it is refused. */
export type DevicePace = (now: number) => { readonly waitMs: number } | 'refused';

/**
 * A token bucket that may run into debt: a device that sends faster than its rate is slowed by the debt, and refused
 * when the debt is larger than the longest wait. The waits of successive messages never fall, so order is kept.
 *
 * @example
 * const pace = createDevicePace({ messagesPerSecond: 20, burst: 1, longestWaitMs: 1000 }, 0);
 * pace(0); // { waitMs: 0 }
 * pace(0); // { waitMs: 50 }
 */
export function createDevicePace(limits: PaceLimits, startedAt: number): DevicePace {
  let tokens = limits.burst;
  let last = startedAt;
  return (now) => {
    const elapsedSeconds = Math.max(0, now - last) / 1000;
    last = Math.max(last, now);
    tokens = Math.min(limits.burst, tokens + elapsedSeconds * limits.messagesPerSecond);
    const waitMs = tokens >= 1 ? 0 : Math.ceil(((1 - tokens) / limits.messagesPerSecond) * 1000);
    if (waitMs > limits.longestWaitMs) return 'refused';
    tokens -= 1;
    return { waitMs };
  };
}
