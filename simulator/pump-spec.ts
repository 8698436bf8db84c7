import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import type { Habit } from './clocks/habit.ts';
import type { ClockType, Trippers } from './clocks/time-clock.ts';
import type { MotorModel } from './control/motor-model.ts';
import type { DirtRates } from './physics/filter.ts';
import type { Supply } from './physics/line-voltage.ts';
import type { MotorDrive } from './physics/motor-drive.ts';
import type { Suction } from './physics/prime.ts';
import type { SystemCurve } from './physics/system-curve.ts';
import type { Climate } from './physics/weather.ts';
import type { WetEnd } from './physics/wet-end.ts';

/** What closes one speed input: a time clock with trippers, or a habit. */
export type ContactSpec = {
  readonly number: number;
  /** What the company calls it: clock, twist-timer, toggle, solar-controller, heater-call or remote. */
  readonly kind: string;
  readonly drives: string | undefined;
  readonly clock?: {
    readonly type: ClockType;
    readonly circuit: 'motor' | 'own';
    readonly trippers: readonly Trippers[];
  };
  readonly habit?: Habit;
};

export type EquipmentSpec = {
  readonly kind: string;
  readonly input: number | undefined;
  readonly interlock: string;
  readonly minimumGpm: number | undefined;
};

/** What the company has on paper beside the motor's settings. */
export type Paper = {
  readonly state: string;
  readonly poolGallons: number | undefined;
  readonly turnoversPerDay: number | undefined;
  readonly nominalVolts: number;
};

/** One pump as it truly is: what was commissioned, and the physics behind it that nobody at a desk knows. */
export type PumpSpec = {
  readonly serial: string;
  readonly padName: string;
  readonly area: string;
  readonly zoneName: string;
  readonly purpose: string;
  /** Commissioned; the motor may come to differ. */
  readonly settings: MotorSettings;
  readonly model: MotorModel;
  readonly firmware: string;
  readonly paper: Paper;
  readonly contacts: readonly ContactSpec[];
  readonly equipment: readonly EquipmentSpec[];
  readonly wetEnd: WetEnd;
  readonly drive: MotorDrive;
  readonly system: SystemCurve;
  readonly suction: Suction;
  readonly dirtRates: DirtRates;
  readonly supply: Supply;
  readonly climate: Climate;
  readonly motorClock: { readonly knowsDaylightSaving: boolean; readonly survivesCuts: boolean };
  /** The weekday of the route's stop, 1 = Monday to 7; absent = nobody calls regularly. */
  readonly stopWeekday: number | undefined;
  /** Whether somebody resets its mechanical clocks in the night when the wall clocks change. */
  readonly dialsKept: boolean;
  /** Whether its household does now and then what households do: vacuums, parties, spa nights. */
  readonly lived: boolean;
};
