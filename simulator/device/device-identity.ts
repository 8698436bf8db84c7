import type { DeviceStatus } from '#shared/contract/mqtt/status.ts';
import { createRandom } from '#simulator/random.ts';

/** Who a device says it is: its connections, its boots, and how long it has been up. */
export type DeviceIdentity = {
  readonly boot: (at: number) => void;
  readonly nextConnection: () => string;
  readonly online: (connection: string, at: number) => DeviceStatus;
  readonly between: (low: number, high: number) => number;
};

/** Creates an identity whose every id follows from the seed. */
export function createDeviceIdentity(serial: string, seed: string, firmware = '1.4.2'): DeviceIdentity {
  const random = createRandom(`${seed}/${serial}/identity`);
  let bootId = uuidFrom(random.next);
  let bootedAt = 0;
  return {
    boot: (at) => {
      bootId = uuidFrom(random.next);
      bootedAt = at;
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
