import { addDeed, type Pump } from '#simulator/pump.ts';

const MINUTE_MS = 60_000;

/** Something a person does at a healthy pad that takes a while: it is left out when something is wrong there. */
export function addOrdinaryDeed(
  pump: Pump,
  at: number,
  takesMinutes: number,
  act: (pump: Pump, at: number) => void,
): void {
  addDeed(pump, at, (_, when) => {
    if (pump.troubles > 0 || when < pump.busyUntil || !pump.powered) return;
    pump.busyUntil = when + (takesMinutes + 1) * MINUTE_MS;
    act(pump, when);
  });
}
