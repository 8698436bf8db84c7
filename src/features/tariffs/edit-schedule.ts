import { type MatrixDraft, NEW_TIER, type PeriodDraft, type ScheduleDraft } from './tariff-draft.ts';

export type Days = 'weekday' | 'weekend';

/** Months and hours from one to another, both counted. */
export type Area = {
  readonly fromMonth: number;
  readonly toMonth: number;
  readonly fromHour: number;
  readonly toHour: number;
};

/** The area between two corners, whichever comes first. */
export const areaBetween = (
  one: { readonly month: number; readonly hour: number },
  other: { readonly month: number; readonly hour: number },
): Area => ({
  fromMonth: Math.min(one.month, other.month),
  toMonth: Math.max(one.month, other.month),
  fromHour: Math.min(one.hour, other.hour),
  toHour: Math.max(one.hour, other.hour),
});

export const isWithin = ({ fromMonth, toMonth, fromHour, toHour }: Area, month: number, hour: number): boolean =>
  month >= fromMonth && month <= toMonth && hour >= fromHour && hour <= toHour;

/** Gives every hour of an area one period. */
export function fillArea(schedule: ScheduleDraft, days: Days, area: Area, period: number): ScheduleDraft {
  const filled: MatrixDraft = schedule[days].map((hours, month) =>
    hours.map((before, hour) => (isWithin(area, month, hour) ? period : before)),
  );
  return { ...schedule, [days]: filled };
}

/** Adds a period that no hour has yet. */
export const addPeriod = <Periods extends { readonly periods: readonly PeriodDraft[] }>(schedule: Periods): Periods => {
  const id = Math.max(0, ...schedule.periods.map((period) => period.id)) + 1;
  return { ...schedule, periods: [...schedule.periods, { id, name: '', tiers: [NEW_TIER] }] };
};

const without =
  (removed: number) =>
  (period: number | null): number | null =>
    period === null || period === removed ? null : period > removed ? period - 1 : period;

/** Takes a period away; its hours are left without one, to be filled anew. */
export const removePeriod = (schedule: ScheduleDraft, removed: number): ScheduleDraft => ({
  periods: schedule.periods.filter((_, index) => index !== removed),
  weekday: schedule.weekday.map((hours) => hours.map(without(removed))),
  weekend: schedule.weekend.map((hours) => hours.map(without(removed))),
});

/** The same for prices by month alone. */
export const removeMonthPrice = <
  Flat extends { readonly periods: readonly PeriodDraft[]; readonly months: readonly (number | null)[] },
>(
  flat: Flat,
  removed: number,
): Flat => ({
  ...flat,
  periods: flat.periods.filter((_, index) => index !== removed),
  months: flat.months.map(without(removed)),
});

export const replacePeriod = <Periods extends { readonly periods: readonly PeriodDraft[] }>(
  schedule: Periods,
  index: number,
  period: PeriodDraft,
): Periods => ({ ...schedule, periods: schedule.periods.map((before, at) => (at === index ? period : before)) });
