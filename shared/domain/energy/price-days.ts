import { calendarMonth, isSameMonth } from './calendar-month.ts';
import { checkTariff } from './check-tariff.ts';
import type { HourUsage } from './hour-usage.ts';
import type { Micros } from './money.ts';
import { priceDemand } from './price-demand.ts';
import { type MonthUse, type PricingOptions, priceSoundEnergy } from './price-energy.ts';
import type { Tariff } from './tariff.ts';

/** An hour of a day with the watt-hours of its largest quarter: what a demand price goes by. */
export type BilledHour = HourUsage & { readonly quarterWattHours: number };

/** The hours of one local day, counted from 1970-01-01. */
export type DayUse = { readonly epochDay: number; readonly hours: readonly BilledHour[] };

/** A tariff in force from one local day to before another; undefined = from the beginning, still. */
export type DayTerm = {
  readonly id: string;
  readonly tariff: Tariff;
  readonly fromDay: number | undefined;
  readonly toDay: number | undefined;
};

/**
 * What a day cost: energy by period, and on the day of its peak the month's demand. `term` is undefined, and the money 0,
 * where no tariff was in force.
 */
export type PricedDay = {
  readonly epochDay: number;
  readonly term: DayTerm | undefined;
  readonly kwh: number;
  readonly kwhByPeriod: readonly number[];
  readonly energyMicrosByPeriod: readonly Micros[];
  readonly demandMicros: Micros;
  readonly micros: Micros;
};

const QUARTER_MS = 900_000;
const DEFAULT_NAMES = 'Period ';

/**
 * The term in force on a local day.
 *
 * @example termOn([{ id, tariff, fromDay: 20_270, toDay: undefined }], 20_269) // undefined: it holds from the day after
 */
export const termOn = (terms: readonly DayTerm[], epochDay: number): DayTerm | undefined =>
  terms.find(({ fromDay = -Infinity, toDay = Infinity }) => epochDay >= fromDay && epochDay < toDay);

/** What people call a period. @example periodName(tariff, 2) // 'Peak', or 'Period 3' where nobody named it */
export const periodName = ({ periodNames }: Pick<Tariff, 'periodNames'>, period: number): string =>
  periodNames?.[period] || `${DEFAULT_NAMES}${period + 1}`;

/** Each hour as its largest quarter: the demand meter's window. */
const quartersOf = ({ hours }: DayUse): HourUsage[] =>
  hours.map((hour) => ({ ...hour, to: hour.from + QUARTER_MS, wattHours: hour.quarterWattHours }));

const hasDemand = ({ demand, flatDemand }: Tariff): boolean => demand !== undefined || flatDemand !== undefined;

/** Demand by day: each line of a stretch falls on the first day that reached it. */
function layDemand(term: DayTerm, days: readonly DayUse[]): Map<number, Micros> {
  const byDay = new Map<number, Micros>();
  const lines = priceDemand(term.tariff, days.flatMap(quartersOf));
  const byItself = days.map((day) => ({ day, lines: priceDemand(term.tariff, quartersOf(day)) }));
  for (const line of lines) {
    const peak = byItself.find(({ lines: own }) =>
      own.some(({ period, kilowatts }) => period === line.period && kilowatts >= line.kilowatts),
    );
    if (peak !== undefined) byDay.set(peak.day.epochDay, (byDay.get(peak.day.epochDay) ?? 0) + line.micros);
  }
  return byDay;
}

/** Days of one calendar month under one tariff, in order. */
function splitStretches(
  days: readonly DayUse[],
  terms: readonly DayTerm[],
): { term: DayTerm | undefined; days: DayUse[] }[] {
  const stretches: { term: DayTerm | undefined; days: DayUse[] }[] = [];
  for (const day of days) {
    const term = termOn(terms, day.epochDay);
    const open = stretches.at(-1);
    const last = open?.days.at(-1);
    const goesOn =
      last !== undefined &&
      open?.term?.id === term?.id &&
      isSameMonth(calendarMonth(last.epochDay), calendarMonth(day.epochDay));
    if (goesOn) open?.days.push(day);
    else stretches.push({ term, days: [day] });
  }
  return stretches;
}

const kwhOf = ({ hours }: DayUse): number => hours.reduce((sum, { wattHours }) => sum + wattHours, 0) / 1000;

function unpriced(day: DayUse): PricedDay {
  const none = { kwhByPeriod: [], energyMicrosByPeriod: [], demandMicros: 0, micros: 0 };
  return { epochDay: day.epochDay, term: undefined, kwh: kwhOf(day), ...none };
}

function priceStretch(term: DayTerm, days: readonly DayUse[], options: PricingOptions): PricedDay[] {
  const demand = hasDemand(term.tariff) ? layDemand(term, days) : new Map<number, Micros>();
  let carried: MonthUse | undefined;
  return days.map((day) => {
    const priced = priceSoundEnergy(term.tariff, day.hours, { ...options, carried });
    carried = priced.carried;
    const kwhByPeriod = term.tariff.energy.periods.map(() => 0);
    const energyMicrosByPeriod = term.tariff.energy.periods.map(() => 0);
    for (const { period, kwh, micros } of priced.lines) {
      kwhByPeriod[period] = kwh;
      energyMicrosByPeriod[period] = micros;
    }
    const demandMicros = demand.get(day.epochDay) ?? 0;
    const { micros, kwh } = priced;
    return {
      epochDay: day.epochDay,
      term,
      kwh,
      kwhByPeriod,
      energyMicrosByPeriod,
      demandMicros,
      micros: micros + demandMicros,
    };
  });
}

/**
 * Prices local days in order, each under the tariff in force on it: tiers go by the use of the calendar month so far, the
 * month's demand falls on the day of its peak. Days of a month priced in parts cost what the month costs, so pass whole
 * calendar months; energy is finite and from 0. Where the tariff changes within a month, tiers and demand begin anew with it. A day without a tariff, or
 * under one with a hole, has no price.
 *
 * @example priceDays(days, [{ id, tariff, fromDay: undefined, toDay: undefined }])[0]?.micros // 1_240_000
 */
export function priceDays(
  days: readonly DayUse[],
  terms: readonly DayTerm[],
  options: Pick<PricingOptions, 'otherKwhByPeriod'> = {},
): PricedDay[] {
  const sound = terms.filter(({ tariff }) => checkTariff(tariff).length === 0);
  return splitStretches(days, sound).flatMap(({ term, days: own }) =>
    term === undefined ? own.map(unpriced) : priceStretch(term, own, options),
  );
}
