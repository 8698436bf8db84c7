import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import { setDial } from './clocks/dial.ts';
import { createFirmware } from './control/firmware.ts';
import { type Key, pressKey } from './control/press-key.ts';
import { aimWater } from './physics/prime.ts';
import { addDeed, type Pump, planProgram } from './pump.ts';

/** Somebody presses a key at the motor. */
export function press(pump: Pump, key: Key, at: number): void {
  pressKey(pump.firmware, pump.settings, key, at);
}

/** Somebody opens the lid of the strainer, cleans the basket and closes it: what is left is mostly air. */
export function openLid(pump: Pump, at: number): void {
  pump.dirt.basket = 1;
  pump.water.fill = 0.22;
  pump.water.since = at;
}

/** The drive starts from nothing, as after a breaker was thrown and closed again by the person who stands there. */
export function restartDrive(pump: Pump): void {
  Object.assign(pump.firmware, createFirmware());
}

/** Stops the pump at the keypad for a while, opens the lid, and lets it go on: it primes again. */
export function stopOpenAndGoOn(pump: Pump, at: number, forMs: number): void {
  press(pump, { key: 'stop' }, at);
  addDeed(pump, at + forMs, (stopped, when) => {
    openLid(stopped, when);
    press(stopped, { key: 'resume' }, when);
    if (stopped.shaft.targetRpm > 0) restartDrive(stopped);
  });
}

/** Changes what the motor is set to, at the keypad. */
export function changeSettings(pump: Pump, change: Partial<MotorSettings>): void {
  pump.settings = { ...pump.settings, ...change };
  pump.program = planProgram(pump.settings);
}

/** Puts the motor's settings back to what was commissioned. */
export function restoreSettings(pump: Pump): void {
  pump.settings = pump.spec.settings;
  pump.program = planProgram(pump.settings);
}

/** Somebody sets the pad's time clocks by a good watch. */
export function setTimeClocks(pump: Pump, at: number): void {
  for (const { clock } of pump.contacts) {
    if (clock !== undefined) setDial(clock.dial, pump.zone, at, Math.round(pump.chance.between(-90_000, 90_000)));
  }
}

/** Something about the suction side changed: the water's way is worked out anew from where it is. */
export function disturbWater(pump: Pump, at: number): void {
  aimWater(pump.water, pump.spec.suction, pump.conditions.suction, pump.shaft.targetRpm, at, pump.startLuck);
}
