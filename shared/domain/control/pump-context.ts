import type { MotorSettings, MotorTraits } from './motor-settings.ts';

export const PAD_STATES = [
  'open',
  'reduced',
  'winterized',
  'opening',
  'new-plaster',
  'drained',
  'repair',
  'hold',
  'vacant',
] as const;
export type PadState = (typeof PAD_STATES)[number];

export const INPUT_KINDS = ['clock', 'twist-timer', 'toggle', 'solar-controller', 'heater-call', 'remote'] as const;
export type InputKind = (typeof INPUT_KINDS)[number];

export const INPUT_DUTIES = ['cleaner', 'heater', 'cell', 'feeder', 'solar', 'feature', 'spa', 'filter'] as const;
export type InputDuty = (typeof INPUT_DUTIES)[number];

export const INTERLOCKS = ['flow-switch', 'pressure-switch', 'none', 'unknown'] as const;
export type Interlock = (typeof INTERLOCKS)[number];

export const EQUIPMENT_KINDS = ['heater', 'cell', 'feeder', 'booster', 'feature', 'solar'] as const;
export type EquipmentKind = (typeof EQUIPMENT_KINDS)[number];

/** A clock's recorded window: trippers in local minutes; the contact opens `opensEarlyMinutes` before the off tripper. */
export type ClockWindow = {
  readonly days: readonly boolean[];
  readonly onMinute: number;
  readonly offMinute: number;
  readonly opensEarlyMinutes: number;
};

/** A wired speed input of a pump. `number` counts from 1. */
export type WiredInput = {
  readonly number: number;
  readonly kind: InputKind;
  readonly windows: readonly ClockWindow[];
  readonly drives?: InputDuty | undefined;
  /** Whether the clock hangs on the motor's circuit or on its own. */
  readonly circuit?: 'motor' | 'own' | undefined;
  readonly clockType?: 'synchronous' | 'spring-carry-over' | 'battery-carry-over' | 'electronic' | undefined;
};

export type Equipment = {
  readonly kind: EquipmentKind;
  /** The input whose clock also feeds this equipment. */
  readonly input?: number | undefined;
  readonly minimumGpm?: number | undefined;
  readonly interlock: Interlock;
};

export type WetEndPoint = { readonly gpm: number; readonly feet: number; readonly watts: number };

/** Everything commissioned about one pump that control, runs and detectors need. Changes seldom, never with a reading. */
export type PumpContext = {
  readonly pumpId: string;
  /** IANA name of the pad's zone. */
  readonly zone: string;
  readonly area?: string | undefined;
  readonly padState: PadState;
  /** Provisioned reading interval, 5 to 60 s. */
  readonly intervalSeconds: number;
  readonly settings: MotorSettings;
  readonly traits: MotorTraits;
  readonly inputs: readonly WiredInput[];
  readonly equipment: readonly Equipment[];
  readonly wetEnd?:
    | { readonly referenceRpm: number; readonly points: readonly WetEndPoint[]; readonly standbyWatts: number }
    | undefined;
  /** System curve, ft per gpm². */
  readonly systemK?: number | undefined;
  readonly poolGallons?: number | undefined;
  readonly turnoversPerDay?: number | undefined;
  /** Nameplate volts. */
  readonly nominalVolts?: number | undefined;
};
