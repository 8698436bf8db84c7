import type { MotorSettings } from '../control/motor-settings.ts';
import type { PadState } from '../control/pump-context.ts';
import type { Reading } from '../readings/reading.ts';

/** What a device says of itself; see the wire contract, status. */
export type DeviceStatus =
  | {
      readonly state: 'online';
      readonly connection: string;
      readonly boot: string;
      readonly upSeconds: number;
      readonly firmware: string;
    }
  | { readonly state: 'lost'; readonly connection: string };

/**
 * Everything that moves a pump's fold, in order of arrival. `receivedAt` is arrival (server time, ms). A reading's
 * `single` says it came alone in its message (clock skew is judged on those only). `time` advances arrival time
 * without news from the device, and only while the server was listening; `listening` marks a (re)start of the server.
 */
export type PumpEvent =
  | { readonly kind: 'reading'; readonly reading: Reading; readonly receivedAt: number; readonly single: boolean }
  | { readonly kind: 'status'; readonly receivedAt: number; readonly status: DeviceStatus }
  | { readonly kind: 'settings'; readonly receivedAt: number; readonly settings: Partial<MotorSettings> }
  | { readonly kind: 'on-site'; readonly receivedAt: number; readonly on: boolean }
  | { readonly kind: 'pad-state'; readonly receivedAt: number; readonly state: PadState }
  | { readonly kind: 'time'; readonly receivedAt: number }
  | { readonly kind: 'listening'; readonly receivedAt: number };
