import { readWeekPlan } from './clocks/week-plan.ts';
import { readContacts, sensedByMotor } from './contacts.ts';
import { type Command, nextFirmwareChange, runFirmware } from './control/firmware.ts';
import { refreshLoad } from './load.ts';
import { aimWater, loadShare, waterFill } from './physics/prime.ts';
import { aimShaft } from './physics/shaft.ts';
import { airCelsius } from './physics/weather.ts';
import type { Pump } from './pump.ts';

/** How often dirt, load and the freeze guard are looked at when nothing else happens, ms. */
const UPKEEP_MS = 15 * 60_000;
/** The motor senses load above this share of it. */
const LOADED_SHARE = 0.4;

/** Air at the pad, °C, as the motor's own sensor has it. */
export function padCelsius(pump: Pump, at: number): number {
  return airCelsius(pump.spec.climate, pump.conditions.spells, at, at + pump.zone.offsetAt(at));
}

/** Lets contacts, program and firmware say what the motor does from now on, and aims shaft and water at it. */
export function decide(pump: Pump, at: number): void {
  const contacts = readContacts(pump, at);
  pump.closed = contacts.closed;
  const program = readWeekPlan(pump.program, pump.motorClock, at);
  if (pump.powered) {
    pump.command = runFirmware(pump.firmware, pump.settings, pump.spec.model, {
      at,
      closed: sensedByMotor(pump),
      programOn: program.on,
      ambientCelsius: padCelsius(pump, at),
      loaded: loadShare(waterFill(pump.water, at)) > LOADED_SHARE,
    });
  }
  aim(pump, pump.powered ? aimedRpm(pump, pump.command) : 0, at);
  pump.decideAt = Math.min(
    contacts.until,
    pump.powered ? program.until : Number.POSITIVE_INFINITY,
    nextFirmwareChange(pump.firmware, at),
    at + UPKEEP_MS,
  );
}

/** The speed the shaft is truly driven at: what was commanded, unless something is wrong. */
function aimedRpm(pump: Pump, command: Command): number {
  const { conditions, settings } = pump;
  if (command.source === 'off' && conditions.unaskedRpm !== undefined) return conditions.unaskedRpm;
  if (command.rpm === 0 || conditions.deadShaft) return 0;
  if (command.source === 'prime') return Math.min(command.rpm, conditions.limitRpm ?? command.rpm);
  let rpm = command.rpm;
  if (command.source === 'input' && conditions.followsLower) rpm = lowestClosed(pump) ?? rpm;
  if (command.source === 'program' && conditions.runsOpen > 0) rpm = settings.inputs[conditions.runsOpen - 1] ?? rpm;
  if (conditions.overrideRpm !== undefined) rpm = conditions.overrideRpm;
  return Math.min(rpm, conditions.limitRpm ?? rpm);
}

function lowestClosed(pump: Pump): number | undefined {
  const speeds = pump.settings.inputs.filter((rpm, index) => rpm !== null && (pump.closed & (1 << index)) !== 0);
  return speeds.length === 0 ? undefined : Math.min(...speeds.map((rpm) => rpm ?? Number.POSITIVE_INFINITY));
}

function aim(pump: Pump, rpm: number, at: number): void {
  const { shaft, spec } = pump;
  // Count the water that passed at the old speed before the new one holds.
  refreshLoad(pump, at);
  if (rpm === shaft.targetRpm) return;
  if (shaft.targetRpm === 0) pump.startLuck = pump.chance.between(0.75, 1.3);
  aimShaft(shaft, rpm, spec.drive.rampUp, spec.drive.rampDown, at);
  aimWater(pump.water, spec.suction, pump.conditions.suction, rpm, at, pump.startLuck);
  refreshLoad(pump, at);
}
