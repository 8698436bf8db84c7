import type { Client } from 'aedes';
import type { ConnectedDevice } from './connected-device.ts';

/** Who is signed in. At most one connection a device; the newest one counts. */
export type DeviceRegistry = {
  readonly add: (device: ConnectedDevice) => void;
  readonly remove: (client: Client) => void;
  readonly findByClient: (client: Client) => ConnectedDevice | undefined;
  readonly findBySerial: (serial: string) => ConnectedDevice | undefined;
  readonly listSerials: () => string[];
  readonly count: () => number;
};

/** An empty registry. */
export function createDeviceRegistry(): DeviceRegistry {
  // A connection that was taken over still publishes its will: it is known by its client for as long as that lives.
  const byClient = new WeakMap<Client, ConnectedDevice>();
  const bySerial = new Map<string, ConnectedDevice>();
  return {
    add: (device) => {
      byClient.set(device.client, device);
      bySerial.set(device.serial, device);
    },
    remove: (client) => {
      const device = byClient.get(client);
      if (device !== undefined && bySerial.get(device.serial) === device) bySerial.delete(device.serial);
    },
    findByClient: (client) => byClient.get(client),
    findBySerial: (serial) => bySerial.get(serial),
    listSerials: () => [...bySerial.keys()],
    count: () => bySerial.size,
  };
}
