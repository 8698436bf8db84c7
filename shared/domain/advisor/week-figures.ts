import { wattHoursToKilowattHours } from '#shared/units/energy.ts';
import type { PlannedRun } from '../control/plan.ts';
import { listLocalSlices } from '../energy/local-slices.ts';
import { type Micros, toMinorUnits } from '../energy/money.ts';
import { ORDINARY_WEEK } from '../energy/plan-week.ts';
import { HOUR_MS } from '../time/local-time.ts';
import { WEEKS_PER_MONTH } from '../time/mean-year.ts';
import type { SpeedOption } from './speed-option.ts';

/** What an ordinary week of a program uses, costs and moves: inputs, primes and standby included. */
export type WeekFigures = {
  readonly kwhPerWeek: number;
  readonly microsPerWeek: Micros;
  /** Whole minor units (cents) of a mean month, rounded once. */
  readonly minorUnitsPerMonth: number;
  readonly gallonsPerWeek: number;
  /** Water by weekday, Monday first, US gallons. */
  readonly gallonsByWeekday: readonly number[];
};

export type FigureTerms = {
  readonly speedAt: (rpm: number) => SpeedOption | undefined;
  readonly standbyWatts: number;
  readonly priceAt: (weekday: number, hour: number) => Micros;
  readonly currency: string;
};

/**
 * Adds an ordinary week's planned runs up: energy by the watts of each speed, money at the price of each hour's next
 * kWh, water by the flow of each speed (a prime's too). Speeds that nothing is known of count as standby.
 *
 * @example figuresOfWeek(planWeek(settings, traits, windows), terms).minorUnitsPerMonth // 2140
 */
export function figuresOfWeek(runs: readonly PlannedRun[], terms: FigureTerms): WeekFigures {
  let [wattHours, microsPerWeek] = [0, 0];
  const gallonsByWeekday = Array.from({ length: 7 }, () => 0);
  for (const run of runs) {
    const option = run.rpm > 0 ? terms.speedAt(run.rpm) : undefined;
    const watts = option?.watts ?? terms.standbyWatts;
    for (const { from, to, weekday, hour } of listLocalSlices(ORDINARY_WEEK.zone, run.from, run.to, 60)) {
      const hours = (to - from) / HOUR_MS;
      wattHours += watts * hours;
      microsPerWeek += terms.priceAt(weekday, hour) * wattHoursToKilowattHours(watts * hours);
      gallonsByWeekday[weekday] = (gallonsByWeekday[weekday] ?? 0) + (option?.gpm ?? 0) * hours * 60;
    }
  }
  return {
    kwhPerWeek: wattHoursToKilowattHours(wattHours),
    microsPerWeek,
    minorUnitsPerMonth: toMinorUnits(microsPerWeek * WEEKS_PER_MONTH, terms.currency) ?? 0,
    gallonsPerWeek: gallonsByWeekday.reduce((sum, gallons) => sum + gallons, 0),
    gallonsByWeekday,
  };
}
