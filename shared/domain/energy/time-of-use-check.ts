import type { PlannedRun } from '../control/plan.ts';
import { MINUTE_MS } from '../time/local-time.ts';
import { WEEKS_PER_MONTH } from '../time/mean-year.ts';
import { marginalMicros } from './charge-tiers.ts';
import { type LocalSlice, listLocalSlices } from './local-slices.ts';
import type { Micros } from './money.ts';
import { ORDINARY_WEEK } from './plan-week.ts';
import { isWeekend, periodAt, type Tariff } from './tariff.ts';

/** What calls for a run: an entry of the motor's program (from 0) or a clock on an input (from 1). */
export type Caller =
  | { readonly kind: 'program'; readonly entry: number }
  | { readonly kind: 'clock'; readonly input: number };

/** What one caller spends in dear hours of one month, a mean week of it. */
export type DearMonth = {
  /** 0 = January. */
  readonly month: number;
  readonly dearMinutesPerWeek: number;
  /** What the same energy would save a week at the cheapest price of its own days. */
  readonly extraMicrosPerWeek: Micros;
};

export type TimeOfUseFinding = {
  readonly caller: Caller;
  readonly months: readonly DearMonth[];
  readonly extraMicrosPerYear: Micros;
};

/** An hour is dear when its price is at least this share over the cheapest of its day; common practice. */
const DEAR_SHARE = 0.1;
const MONTHS = 12;
/** Any length does for the price of a first kWh. */
const ANY_DAYS = 30;

const callerOf = ({ because, activeInput }: PlannedRun): Caller | undefined => {
  if (because.kind === 'program') return { kind: 'program', entry: because.entry };
  // A prime belongs to the clock that asked for the start; one that the program asked for is short and let go.
  return activeInput > 0 ? { kind: 'clock', input: activeInput } : undefined;
};

const keyOf = (caller: Caller): string => (caller.kind === 'program' ? `p${caller.entry}` : `c${caller.input}`);

/** The price of the first kWh in an hour, micros. */
const priceAt = (tariff: Tariff, month: number, weekday: number, hour: number): Micros => {
  const period = periodAt(tariff.energy, month, weekday, hour);
  return period === undefined ? 0 : marginalMicros(tariff.energy.periods[period] ?? [], 0, ANY_DAYS);
};

function cheapestOf(tariff: Tariff, month: number, weekend: boolean): Micros {
  const weekday = weekend ? 5 : 0;
  return Math.min(...Array.from({ length: 24 }, (_, hour) => priceAt(tariff, month, weekday, hour)));
}

type CalledSlice = LocalSlice & { readonly watts: number };

function checkMonth(tariff: Tariff, month: number, slices: readonly CalledSlice[]): DearMonth | undefined {
  const cheapest = [cheapestOf(tariff, month, false), cheapestOf(tariff, month, true)];
  let [dearMinutesPerWeek, extraMicrosPerWeek] = [0, 0];
  for (const { from, to, weekday, hour, watts } of slices) {
    const least = cheapest[isWeekend(weekday) ? 1 : 0] ?? 0;
    const extra = priceAt(tariff, month, weekday, hour) - least;
    if (!(extra > DEAR_SHARE * Math.abs(least))) continue;
    const minutes = (to - from) / MINUTE_MS;
    dearMinutesPerWeek += minutes;
    extraMicrosPerWeek += (extra * watts * minutes) / 60_000;
  }
  return dearMinutesPerWeek > 0 ? { month, dearMinutesPerWeek, extraMicrosPerWeek } : undefined;
}

/**
 * Finds what runs in dear hours: entries of the program and windows of the clocks alike, by month, with what the same
 * energy would cost less at the cheapest price of the day. Runs are those of an ordinary week (`planWeek`), `wattsAt`
 * gives their watts by speed (undefined or not finite where unknown: they are left out). The tariff is free of faults
 * (`checkTariff`); tiers count at their first kWh. Worst first.
 *
 * @example checkTimeOfUse(tariff, planWeek(settings, traits, windows), (rpm) => wattsOf(rpm))
 * // [{ caller: { kind: 'clock', input: 1 }, months: [{ month: 5, dearMinutesPerWeek: 600, … }], extraMicrosPerYear: 41_000_000 }]
 */
export function checkTimeOfUse(
  tariff: Tariff,
  week: readonly PlannedRun[],
  wattsAt: (rpm: number) => number | undefined,
): TimeOfUseFinding[] {
  const called = new Map<string, { caller: Caller; slices: CalledSlice[] }>();
  for (const run of week) {
    const caller = callerOf(run);
    const watts = wattsAt(run.rpm);
    if (caller === undefined || watts === undefined || !(watts > 0) || !Number.isFinite(watts)) continue;
    const entry = called.get(keyOf(caller)) ?? { caller, slices: [] };
    called.set(keyOf(caller), entry);
    const slices = listLocalSlices(ORDINARY_WEEK.zone, run.from, run.to, 60);
    entry.slices.push(...slices.map((slice) => ({ ...slice, watts })));
  }
  return [...called.values()]
    .flatMap(({ caller, slices }) => {
      const months = Array.from({ length: MONTHS }, (_, month) => checkMonth(tariff, month, slices) ?? []).flat();
      const perWeek = months.reduce((sum, month) => sum + month.extraMicrosPerWeek, 0);
      return months.length === 0 ? [] : [{ caller, months, extraMicrosPerYear: perWeek * WEEKS_PER_MONTH }];
    })
    .sort((left, right) => right.extraMicrosPerYear - left.extraMicrosPerYear);
}
