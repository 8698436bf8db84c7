import { encodeSettings } from '#shared/contract/mqtt/settings.ts';
import { formatDays, formatMinuteOfDay } from '#shared/contract/mqtt/wall-time.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { lineWatts } from '#simulator/physics/motor-drive.ts';
import { systemFeet } from '#simulator/physics/system-curve.ts';
import { headFeet, shaftWatts } from '#simulator/physics/wet-end.ts';
import type { ContactSpec, PumpSpec } from '#simulator/pump-spec.ts';

const AS_COMMISSIONED = { valve: 1, dirt: 1, staticFeet: 0 };
/** Shares of the best flow at which a maker prints his curve. */
const PRINTED_SHARES = [0, 0.2, 0.4, 0.6, 0.8, 1, 1.15, 1.3];

/** One pump as the company would have entered it: an element of a backtest's pads file. */
export function describePad(spec: PumpSpec, cadenceMs: number): Record<string, unknown> {
  return {
    serial: spec.serial,
    timezone: spec.zoneName,
    area: spec.area,
    state: spec.paper.state,
    settings: JSON.parse(encodeSettings(spec.settings)),
    inputs: spec.contacts.map(describeInput),
    equipment: spec.equipment.map(({ kind, input, minimumGpm, interlock }) => ({
      kind,
      input,
      minGpm: minimumGpm,
      interlock,
    })),
    model: {
      refRpm: spec.wetEnd.referenceRpm,
      points: printCurve(spec),
      standbyW: spec.drive.standbyWatts,
      driveHotC: spec.model.driveHotCelsius,
    },
    system: { k: findSystemK(spec) },
    pool: spec.paper.poolGallons === undefined ? undefined : { gal: spec.paper.poolGallons },
    turnoversPerDay: spec.paper.turnoversPerDay,
    nominalV: spec.paper.nominalVolts,
    intervalS: cadenceMs / 1000,
  };
}

function describeInput(contact: ContactSpec): Record<string, unknown> {
  const { clock } = contact;
  return {
    n: contact.number,
    kind: contact.kind,
    windows: clock?.trippers.map((tripper) => ({
      days: formatDays(tripper.days),
      on: formatMinuteOfDay(tripper.onMinute),
      off: formatMinuteOfDay(tripper.offMinute),
      opensEarlyMin: tripper.opensEarlyMinutes,
    })),
    drives: contact.drives,
    circuit: clock?.circuit,
    type: clock?.type,
  };
}

/** The curve as a maker prints it: heads to half a foot, watts to ten. */
export function printCurve({ wetEnd, drive }: PumpSpec): { gpm: number; ft: number; w: number }[] {
  return PRINTED_SHARES.map((share) => {
    const gpm = Math.round((share * wetEnd.bestGpm) / 2) * 2;
    const watts = lineWatts(drive, shaftWatts(wetEnd, gpm, wetEnd.referenceRpm), wetEnd.referenceRpm);
    const feet = headFeet(wetEnd, gpm, wetEnd.referenceRpm);
    return { gpm, ft: Math.round(feet * 2) / 2, w: Math.round(watts / 10) * 10 };
  });
}

/** The system curve somebody found at start-up with a gauge at a high speed, ft per gpm², to three figures. */
export function findSystemK({ wetEnd, system }: PumpSpec): number {
  const gpm = dutyGpm(wetEnd, system, AS_COMMISSIONED, 2800);
  return Number((systemFeet(system, AS_COMMISSIONED, gpm) / gpm ** 2).toPrecision(3));
}
