import {
  DEFAULT_TRAITS,
  type MotorSettings,
  type MotorTraits,
  type ProgramEntry,
} from '#shared/domain/control/motor-settings.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { instantOf } from '#shared/domain/time/instant-of.ts';

export const EVERY_DAY: readonly boolean[] = Array(7).fill(true);

/** Minutes after midnight of HH:MM. */
export function minute(time: string): number {
  return Number(time.slice(0, 2)) * 60 + Number(time.slice(3));
}

export function entry(from: string, to: string, rpm: number, days: readonly boolean[] = EVERY_DAY): ProgramEntry {
  return { days, fromMinute: minute(from), toMinute: minute(to), rpm };
}

export const SETTINGS: MotorSettings = {
  inputs: [2850, 2400, null],
  program: [entry('06:00', '20:00', 1700)],
  prime: { rpm: 3450, seconds: 300 },
  timed: { rpm: 3200, minutes: 45 },
  freeze: { celsius: 4.4, rpm: 1150 },
  maxRpm: 3450,
  minRpm: 600,
};

export type Invented = {
  readonly zone?: string;
  readonly settings?: Partial<MotorSettings>;
  readonly traits?: Partial<MotorTraits>;
  readonly intervalSeconds?: number;
} & Partial<Pick<PumpContext, 'inputs'>>;

export function inventedPump({ zone, settings, traits, intervalSeconds, inputs }: Invented = {}): PumpContext {
  return {
    pumpId: 'pump-1',
    zone: zone ?? 'America/Phoenix',
    padState: 'open',
    intervalSeconds: intervalSeconds ?? 10,
    settings: { ...SETTINGS, ...settings },
    traits: { ...DEFAULT_TRAITS, ...traits },
    inputs: inputs ?? [],
    equipment: [],
  };
}

/** The instant of a wall time written `2025-07-01 06:30` or `2025-07-01 06:30:15`. */
export function wall(zone: string, text: string): number {
  const epochDay = Date.parse(`${text.slice(0, 10)}T00:00:00Z`) / 86_400_000;
  const at = instantOf(zone, epochDay, minute(text.slice(11, 16)));
  if (at === undefined) throw new Error(`no zone ${zone}`);
  return at + Number(text.slice(17) || 0) * 1000;
}

export function reading(at: number, rpm: number, more: Partial<Reading> = {}): Reading {
  return { at, rpm, closedInputs: 0, activeInput: 0, watts: rpm > 0 ? 300 : 5, ...more };
}
