import { DEFAULT_TRAITS, type MotorTraits } from '#shared/domain/control/motor-settings.ts';
import type { Equipment, PumpContext, WiredInput } from '#shared/domain/control/pump-context.ts';
import type { BacktestPad } from './pad-file.ts';

const toTraits = (pad: BacktestPad): MotorTraits => ({
  ...DEFAULT_TRAITS,
  inputCount:
    pad.model?.inputCount ?? Math.max(pad.settings.inputs?.length ?? 0, ...pad.inputs.map((input) => input.n), 3),
  programOverlap: pad.model?.programOverlap ?? DEFAULT_TRAITS.programOverlap,
  stopBeatsInputs: pad.model?.stopBeatsInputs ?? DEFAULT_TRAITS.stopBeatsInputs,
  timedResumes: pad.model?.timedResumes ?? DEFAULT_TRAITS.timedResumes,
  driveHotCelsius: pad.model?.driveHotC ?? DEFAULT_TRAITS.driveHotCelsius,
});

const toWiredInput = (input: BacktestPad['inputs'][number]): WiredInput => ({
  number: input.n,
  kind: input.kind,
  windows: input.windows.map((window) => ({
    days: window.days,
    onMinute: window.on,
    offMinute: window.off,
    opensEarlyMinutes: window.opensEarlyMin,
  })),
  drives: input.drives,
  circuit: input.circuit,
  clockType: input.type,
});

const toEquipment = (equipment: BacktestPad['equipment'][number]): Equipment => ({
  kind: equipment.kind,
  input: equipment.input,
  minimumGpm: equipment.minGpm,
  interlock: equipment.interlock,
});

const toWetEnd = (model: BacktestPad['model']): PumpContext['wetEnd'] =>
  model?.refRpm === undefined || model.points === undefined
    ? undefined
    : {
        referenceRpm: model.refRpm,
        points: model.points.map((point) => ({ gpm: point.gpm, feet: point.ft, watts: point.w })),
        standbyWatts: model.standbyW,
      };

/** A pad of the file as the fold knows it; what is missing stays undefined, so only the detectors that need none of it run. */
export function toPumpContext(pad: BacktestPad): PumpContext {
  return {
    pumpId: pad.serial,
    zone: pad.timezone,
    area: pad.area,
    padState: pad.state,
    intervalSeconds: pad.intervalS,
    settings: {
      inputs: pad.settings.inputs ?? [],
      program: pad.settings.program ?? [],
      prime: pad.settings.prime ?? null,
      timed: pad.settings.timed ?? null,
      freeze: pad.settings.freeze ?? null,
      maxRpm: pad.settings.maxRpm ?? 3450,
      minRpm: pad.settings.minRpm ?? 0,
    },
    traits: toTraits(pad),
    inputs: pad.inputs.map(toWiredInput),
    equipment: pad.equipment.map(toEquipment),
    wetEnd: toWetEnd(pad.model),
    systemK: pad.system?.k,
    poolGallons: pad.pool?.gal,
    turnoversPerDay: pad.turnoversPerDay,
    nominalVolts: pad.nominalV,
  };
}
