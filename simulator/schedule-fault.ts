import type { Fault } from './faults/fault.ts';
import { addDeed, type Pump } from './pump.ts';
import type { TruthBook } from './truth.ts';

/**
 * Puts a fault on a pump from `from` until `until`, and its truth into the book. Where somebody is at the pump, it
 * waits until he has left.
 */
export function scheduleFault(pump: Pump, fault: Fault, from: number, until: number, truth?: TruthBook): void {
  addDeed(pump, from, (_, at) => {
    if (at < pump.busyUntil) {
      scheduleFault(pump, fault, pump.busyUntil, Math.max(until, pump.busyUntil + 1), truth);
      return;
    }
    pump.troubles += 1;
    fault.begin(pump, at, until);
    const sighting = truth?.open(pump, fault, at);
    addDeed(pump, until, (_pump, endedAt) => {
      pump.troubles -= 1;
      fault.end(pump, endedAt);
      sighting?.close(endedAt);
    });
  });
}
