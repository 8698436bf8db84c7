import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import type { Firmware } from './firmware.ts';

/** What a person does at the keypad. */
export type Key =
  | { readonly key: 'stop' }
  | { readonly key: 'resume' }
  | { readonly key: 'timed' }
  | { readonly key: 'manual'; readonly rpm: number };

/** A key pressed at the motor. `resume` ends a stop, a manual speed and a timed run. */
export function pressKey(firmware: Firmware, settings: MotorSettings, key: Key, at: number): void {
  firmware.stopped = key.key === 'stop';
  firmware.keypadRpm = key.key === 'manual' ? key.rpm : undefined;
  firmware.timedEndsAt =
    key.key === 'timed' && settings.timed !== null ? at + settings.timed.minutes * 60_000 : undefined;
}
