import type { Micros } from './money.ts';

/**
 * A tier of a price. The price is `rateMicros` + `adjustmentMicros` a kWh (or kW). `upTo` is the tier's upper bound a
 * month (kWh, or kW of demand; with `perDay`, kWh a day times the days of the month); the last tier has none.
 */
export type RateTier = {
  readonly rateMicros: Micros;
  readonly adjustmentMicros: Micros;
  readonly upTo?: number | undefined;
  readonly perDay?: boolean | undefined;
};

/** Twelve months (January first) of 24 hours, each the number of a period. */
export type HourMatrix = readonly (readonly number[])[];

/** Prices by period, and which period rules each wall-clock hour of weekdays and weekends. */
export type RateSchedule = {
  readonly periods: readonly (readonly RateTier[])[];
  readonly weekday: HourMatrix;
  readonly weekend: HourMatrix;
};

/**
 * An electricity tariff in the open rate-schedule shape, money in micros (millionths of the currency's unit). `demand`
 * prices the largest mean kW of a month in each period; `flatDemand` the largest of all hours, its period by month.
 */
export type Tariff = {
  readonly name: string;
  /** ISO 4217. */
  readonly currency: string;
  readonly fixedMicrosPerMonth: Micros;
  readonly energy: RateSchedule;
  /** Added to every kWh, by month (January first): fuel adjustment. */
  readonly monthlyAdjustmentMicros?: readonly Micros[] | undefined;
  readonly demand?: RateSchedule | undefined;
  readonly flatDemand?:
    | { readonly periods: readonly (readonly RateTier[])[]; readonly months: readonly number[] }
    | undefined;
  /** What people call the periods, by number. */
  readonly periodNames?: readonly string[] | undefined;
};

/** Weekday 0 = Monday; Saturday and Sunday are the weekend. A utility's holidays are not known and count as weekdays. */
export const isWeekend = (weekday: number): boolean => weekday >= 5;

/**
 * The period that rules a wall-clock hour: month 0 to 11, weekday 0 = Monday, hour 0 to 23. undefined in a hole.
 *
 * @example periodAt(tariff.energy, 6, 0, 17) // 2
 */
export const periodAt = (schedule: RateSchedule, month: number, weekday: number, hour: number): number | undefined =>
  (isWeekend(weekday) ? schedule.weekend : schedule.weekday)[month]?.[hour];
