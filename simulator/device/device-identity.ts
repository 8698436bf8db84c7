import type { DeviceStatus } from '#shared/contract/mqtt/status.ts';
import { createRandom } from '#simulator/random.ts';

/** Who a device says it is: its connections, its boots, and how long it has been up. */
export type DeviceIdentity = {
  /** The device started for the n-th time, at `since`, ms. */
  readonly boot: (count: number, since: number) => void;
  readonly nextConnection: () => string;
  readonly online: (connection: string, at: number) => DeviceStatus;
  readonly between: (low: number, high: number) => number;
};

export type IdentityOptions = {
  readonly serial: string;
  readonly firmware: string;
  /** Boots follow from the story, so that they go on where a history ended… */
  readonly storySeed: string;
  /** …and connections from each start of the program. */
  readonly connectionSeed: string;
};

export function createDeviceIdentity({ serial, firmware, storySeed, connectionSeed }: IdentityOptions): DeviceIdentity {
  const random = createRandom(`${connectionSeed}/${serial}/connections`);
  let bootId = '';
  let bootedAt = 0;
  return {
    boot: (count, since) => {
      bootId = uuidFrom(createRandom(`${storySeed}/${serial}/boot-${count}`).next);
      bootedAt = since;
    },
    nextConnection: () => uuidFrom(random.next),
    online: (connection, at) => ({
      state: 'online',
      connection,
      boot: bootId,
      upSeconds: Math.max(0, Math.round((at - bootedAt) / 1000)),
      firmware,
    }),
    between: (low, high) => Math.round(random.between(low, high)),
  };
}

/** A random UUID, version 4 (RFC 9562), from a stream of chance. */
export function uuidFrom(next: () => number): string {
  const digits = Array.from({ length: 32 }, () => Math.floor(next() * 16).toString(16));
  digits[12] = '4';
  digits[16] = '89ab'.charAt(Math.floor(next() * 4));
  const text = digits.join('');
  return `${text.slice(0, 8)}-${text.slice(8, 12)}-${text.slice(12, 16)}-${text.slice(16, 20)}-${text.slice(20)}`;
}
