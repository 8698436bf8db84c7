import { createZone, type Zone } from './clocks/zone.ts';
import { createPump, type Pump } from './pump.ts';
import type { PumpSpec } from './pump-spec.ts';
import { createVirtualPump, type VirtualPump } from './virtual-pump.ts';

export type FleetOptions = {
  readonly seed: string;
  /** When every pump's story begins, ms. */
  readonly from: number;
  readonly cadenceMs: number;
};

export type Fleet = {
  readonly options: FleetOptions;
  readonly members: readonly VirtualPump[];
  readonly pumps: readonly Pump[];
};

/** Creates the pumps of a fleet, all standing still at `from`. Zones are shared. */
export function createFleet(specs: readonly PumpSpec[], options: FleetOptions): Fleet {
  const zones = new Map<string, Zone>();
  const zoneOf = (name: string): Zone => {
    const zone = zones.get(name) ?? createZone(name);
    zones.set(name, zone);
    return zone;
  };
  const pumps = specs.map((spec) => createPump(spec, zoneOf(spec.zoneName), options.seed, options.from));
  return { options, pumps, members: pumps.map((pump) => createVirtualPump(pump, options.cadenceMs)) };
}

/** Brings every pump to the same instant without measuring anything. */
export function fastForward(fleet: Fleet, until: number): void {
  for (const member of fleet.members) member.advance(until);
}
