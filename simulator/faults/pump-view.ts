import { dialMs } from '#simulator/clocks/dial.ts';
import { readTimeClock } from '#simulator/clocks/time-clock.ts';
import { readWeekPlan } from '#simulator/clocks/week-plan.ts';
import { findLoad, withFriction } from '#simulator/load.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { lineWatts } from '#simulator/physics/motor-drive.ts';
import { loadShare, waterFill } from '#simulator/physics/prime.ts';
import { dryShaftWatts, shaftWatts } from '#simulator/physics/wet-end.ts';
import type { Contact, Pump } from '#simulator/pump.ts';
import type { ContactSpec, PumpSpec } from '#simulator/pump-spec.ts';

/** Whether the shaft is driven and has come to its speed. */
export function isSettled(pump: Pump, at: number): boolean {
  return pump.shaft.targetRpm > 0 && at >= pump.shaft.settlesAt;
}

/** Watts as a share of what a clean, full pump would take at this speed, valves as commissioned. */
export function loadOfClean(pump: Pump, at: number): number {
  const rpm = pump.shaft.targetRpm;
  if (rpm <= 0) return 1;
  const { wetEnd, drive } = pump.spec;
  const share = loadShare(waterFill(pump.water, at));
  const shaft = pump.load.dryWatts + (pump.load.wetWatts - pump.load.dryWatts) * share;
  const clean = lineWatts(drive, shaftWatts(wetEnd, cleanGpm(pump, rpm), rpm), rpm);
  return lineWatts(drive, withFriction(pump, shaft, rpm), rpm) / clean;
}

/** Flow at a speed with filter, basket and valves as commissioned, gpm. */
export function cleanGpm(pump: Pump, rpm: number): number {
  const { conditions, dirt } = pump;
  const clean = { ...conditions, valve: 1, extraStaticFeet: 0, suction: { ...conditions.suction, blocked: false } };
  return findLoad({ ...pump, conditions: clean, dirt: { ...dirt, basket: 1, filter: 1 } }, rpm).gpm;
}

/** Whether it turns as if it held air, or moved nothing: below halfway between dry and full. */
export function isUnloaded(pump: Pump, at: number): boolean {
  const rpm = pump.shaft.targetRpm;
  if (rpm <= 0) return false;
  const { wetEnd, drive } = pump.spec;
  const full = lineWatts(drive, shaftWatts(wetEnd, cleanGpm(pump, rpm), rpm), rpm);
  const dry = lineWatts(drive, dryShaftWatts(wetEnd, rpm), rpm);
  return loadOfClean(pump, at) < (1 + dry / full) / 2;
}

/** The first input that a time clock closes, by its spec. */
export function findClockInput(spec: PumpSpec): ContactSpec | undefined {
  return spec.contacts.find((contact) => contact.clock !== undefined);
}

/** The first contact that a time clock closes. */
export function getClockContact(pump: Pump): Contact {
  const contact = pump.contacts.find(({ clock }) => clock !== undefined);
  if (contact === undefined) throw new Error(`${pump.spec.serial} has no time clock.`);
  return contact;
}

/** Whether the clock's own dial would have the contact closed. */
export function isDueByClock(contact: Contact, at: number): boolean {
  return contact.clock !== undefined && readTimeClock(contact.clock, at).closed;
}

/** How far a dial is from wall time, ms; positive = fast. */
export function dialErrorMs(pump: Pump, dial: Parameters<typeof dialMs>[0], at: number): number {
  return dialMs(dial, at) - at - pump.zone.offsetAt(at);
}

/** Speed an input is set to, rpm; 0 when it is not used. */
export function inputRpm(spec: PumpSpec, number: number): number {
  return spec.settings.inputs[number - 1] ?? 0;
}

/** Whether an input's bit is set in what the device sees. */
export function isClosed(pump: Pump, number: number): boolean {
  return (pump.closed & (1 << (number - 1))) !== 0;
}

/** Whether program or a closed input calls for a speed, whatever the motor does. */
export function isDue(pump: Pump, at: number): boolean {
  const wanted = pump.settings.inputs.some((rpm, index) => rpm !== null && (pump.closed & (1 << index)) !== 0);
  return wanted || readWeekPlan(pump.program, pump.motorClock, at).on.length > 0;
}

/** Watts with all friction times `valve`, as a share of the commissioned watts, at the slowest speed of the program. */
export function wattsShareAtValve(spec: PumpSpec, valve: number): number {
  const rpm = Math.min(...spec.settings.program.map((entry) => entry.rpm));
  if (!Number.isFinite(rpm)) return 1;
  const watts = (factor: number) => {
    const gpm = dutyGpm(spec.wetEnd, spec.system, { valve: factor, dirt: 1, staticFeet: 0 }, rpm);
    return lineWatts(spec.drive, shaftWatts(spec.wetEnd, gpm, rpm), rpm);
  };
  return watts(valve) / watts(1);
}
