import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import { setDial } from './clocks/dial.ts';
import { createFirmware } from './control/firmware.ts';
import { type Key, pressKey } from './control/press-key.ts';
import { aimWater } from './physics/prime.ts';
import { cutPower } from './power.ts';
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

/** Clears the drive's fault: it starts from nothing. */
export function restartDrive(pump: Pump): void {
  Object.assign(pump.firmware, createFirmware());
}

/**
 * Works on the pump while it stands, then lets it go on: it primes again. Clocks at off and the breaker, or the keypad
 * where that stops this motor and whoever does it knows no better.
 */
export function workOnPump(
  pump: Pump,
  at: number,
  forMs: number,
  stopBy: 'breaker' | 'keypad',
  done: (at: number) => void,
): void {
  const keypad = stopBy === 'keypad' && pump.spec.model.stopBeatsInputs;
  pump.conditions.leversOff = true;
  pump.busyUntil = Math.max(pump.busyUntil, at + forMs + 60_000);
  if (keypad) press(pump, { key: 'stop' }, at);
  else cutPower(pump, at, at + forMs, 'motor');
  addDeed(pump, at + forMs, (_, when) => {
    pump.conditions.leversOff = false;
    if (keypad) press(pump, { key: 'resume' }, when);
    done(when);
  });
}

/** Stops the pump, opens the lid, cleans the basket and starts it again. */
export function cleanBasket(pump: Pump, at: number, forMs: number, stopBy: 'breaker' | 'keypad'): void {
  workOnPump(pump, at, forMs, stopBy, (when) => openLid(pump, when));
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
