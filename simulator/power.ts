import { startDial, stopDial } from './clocks/dial.ts';
import { createFirmware } from './control/firmware.ts';
import { addDeed, type Pump } from './pump.ts';

/** How far a cut reaches: the whole street, or the motor's own breaker, which some clocks share. */
export type Reach = 'street' | 'motor';

/** Takes the supply away from now until `until`. Clocks on the dead circuit stand once their carry-over is spent. */
export function cutPower(pump: Pump, at: number, until: number, reach: Reach): void {
  pump.powered = false;
  const dials = pump.contacts.flatMap(({ clock }) =>
    clock !== undefined && (reach === 'street' || clock.circuit === 'motor') ? [clock.dial] : [],
  );
  for (const dial of [...dials, pump.motorClock]) {
    if (at + dial.carryOverMs >= until) continue;
    addDeed(pump, at + dial.carryOverMs, (_, when) => stopDial(dial, when));
    addDeed(pump, until, (_, when) => startDial(dial, when));
  }
  addDeed(pump, until, restorePower);
}

/** Power is back: the drive and the device start from nothing. */
function restorePower(pump: Pump, at: number): void {
  pump.powered = true;
  pump.poweredSince = at;
  pump.boots += 1;
  Object.assign(pump.firmware, createFirmware());
}
