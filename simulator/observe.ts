import type { Reading } from '#shared/contract/mqtt/readings.ts';
import { dialMs } from './clocks/dial.ts';
import { padCelsius } from './decide.ts';
import { findLoad, withFriction } from './load.ts';
import { driveRise } from './physics/drive-heat.ts';
import { lineVolts } from './physics/line-voltage.ts';
import { meterWatts } from './physics/meter.ts';
import { lineWatts } from './physics/motor-drive.ts';
import { loadShare, waterFill } from './physics/prime.ts';
import { shaftRpm } from './physics/shaft.ts';
import type { Pump } from './pump.ts';

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;

/** What the device measures now and would put on the wire. Draws from the reading's own noise and changes nothing. */
export function observeReading(pump: Pump, at: number): Reading {
  const { noise, command, conditions } = pump;
  const { says } = pump.spec.model;
  const trueRpm = shaftRpm(pump.shaft, at);
  const rpm = trueRpm === 0 ? 0 : Math.max(0, Math.round(trueRpm + noise.normal() * 1.6));
  const ambient = says.temperatures ? padCelsius(pump, at) : 0;
  return {
    at: at - conditions.skewMs,
    rpm,
    closedInputs: pump.closed,
    activeInput: command.activeInput > 0 ? (conditions.saysActive ?? command.activeInput) : 0,
    watts: meterWatts(pump.meter, trueWatts(pump, trueRpm, at), noise.normal() * 0.004),
    reportedSource: says.source ? command.source : undefined,
    volts: says.volts ? observeVolts(pump, at) : undefined,
    driveCelsius: says.temperatures ? halfDegree(ambient + driveRise(pump.heat, at)) : undefined,
    ambientCelsius: says.temperatures ? halfDegree(ambient) : undefined,
    motorClockMinute: says.motorClock ? Math.floor((dialMs(pump.motorClock, at) % DAY_MS) / MINUTE_MS) : undefined,
    fault: pump.firmware.fault?.code,
  };
}

/** True watts at the line terminals. */
export function trueWatts(pump: Pump, rpm: number, at: number): number {
  if (rpm <= 0) return lineWatts(pump.spec.drive, 0, 0);
  const load = rpm === pump.load.rpm ? pump.load : findLoad(pump, rpm);
  const share = loadShare(unsteadyFill(pump, at));
  const shaft = load.dryWatts + (load.wetWatts - load.dryWatts) * share;
  return lineWatts(pump.spec.drive, withFriction(pump, shaft, rpm), rpm);
}

/** Air on its way through makes the load unsteady, each kind of trouble in its own manner. */
function unsteadyFill(pump: Pump, at: number): number {
  const { suction } = pump.conditions;
  const fill = waterFill(pump.water, at);
  const troubled = suction.airLeak > 0 || suction.waterLow || suction.gulps !== 'no' || suction.blocked;
  if (fill >= 1 && !troubled) return 1;
  const shifted = fill + pump.noise.normal() * (suction.gulps === 'ragged' ? 0.16 : 0.025);
  // A vortex at the skimmer comes and goes every quarter of a minute.
  const surging = suction.waterLow ? shifted + 0.16 * Math.sin(at / 2600) : shifted;
  return surging < 0 ? 0 : Math.min(surging, 1);
}

function observeVolts(pump: Pump, at: number): number {
  const volts = lineVolts(pump.spec.supply, pump.conditions.supplyShare, at + pump.zone.offsetAt(at));
  return Math.round((volts + pump.noise.normal() * 0.4) * 10) / 10;
}

function halfDegree(celsius: number): number {
  return Math.round(celsius * 2) / 2;
}
