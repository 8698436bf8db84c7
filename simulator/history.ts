import { type Arrival, createInProcessDevice } from './device/in-process-device.ts';
import type { Fleet } from './fleet.ts';
import { createRandom } from './random.ts';

export type HistoryOptions = {
  readonly to: number;
  /** Largest latency between device and server, ms; 0 = arrival is device time. */
  readonly latencyMs: number;
};

/** How much of the fleet's time is played before its messages are put in order, ms. */
const CHUNK_MS = 20 * 60_000;

/**
 * Plays a fleet in process up to `to` and yields its messages in order of arrival over the whole fleet. What would
 * arrive after `to` is not yielded. The fleet is left at `to`.
 */
export function* generateHistory(fleet: Fleet, options: HistoryOptions): Generator<Arrival, void> {
  const { seed, from } = fleet.options;
  let waiting: Arrival[] = [];
  const players = fleet.members.map((member) => {
    const { serial, firmware } = member.pump.spec;
    const random = createRandom(`${seed}/${serial}/latency`);
    const latency = options.latencyMs === 0 ? () => 0 : () => random.between(20, options.latencyMs);
    const device = createInProcessDevice(serial, { firmware, storySeed: seed }, latency, (arrival) =>
      waiting.push(arrival),
    );
    return { member, device };
  });
  for (let until = from; until < options.to; ) {
    until = Math.min(until + CHUNK_MS, options.to);
    for (const { member, device } of players) {
      member.advance(until, device.hear);
      device.settle(until);
    }
    // Sorting is stable, so messages of one device stay in their order.
    waiting.sort((a, b) => a.at - b.at);
    const due = waiting.findIndex((arrival) => arrival.at > until);
    const count = due === -1 ? waiting.length : due;
    yield* waiting.slice(0, count);
    waiting = waiting.slice(count);
  }
}
