import type { TariffShape } from '#shared/contract/http/tariffs.ts';

/** A tier as it is typed; `upTo` is '' in the last one. */
export type TierDraft = {
  readonly rate: string;
  readonly adjustment: string;
  readonly upTo: string;
  readonly perDay: boolean;
};

/** `id` keeps a period's fields its own while others come and go. */
export type PeriodDraft = { readonly id: number; readonly name: string; readonly tiers: readonly TierDraft[] };

/** Twelve months of 24 hours, each the place of a period in the list; null = none yet. */
export type MatrixDraft = readonly (readonly (number | null)[])[];

export type ScheduleDraft = {
  readonly periods: readonly PeriodDraft[];
  readonly weekday: MatrixDraft;
  readonly weekend: MatrixDraft;
};

export type FlatDraft = { readonly periods: readonly PeriodDraft[]; readonly months: readonly (number | null)[] };

export type TariffDraft = {
  readonly name: string;
  readonly currency: string;
  readonly fixedPerMonth: string;
  readonly energy: ScheduleDraft;
  readonly monthlyAdjustment: readonly string[] | null;
  readonly demand: ScheduleDraft | null;
  readonly flatDemand: FlatDraft | null;
};

export const MONTHS = 12;
export const HOURS = 24;

export const NEW_TIER: TierDraft = { rate: '', adjustment: '0', upTo: '', perDay: false };
const matrixOf = (period: number): MatrixDraft =>
  Array.from({ length: MONTHS }, () => Array.from({ length: HOURS }, () => period));
const newPeriod = (): PeriodDraft => ({ id: 1, name: '', tiers: [NEW_TIER] });

/** A schedule of one price for every hour: what most begin with. */
export const newSchedule = (): ScheduleDraft => ({
  periods: [newPeriod()],
  weekday: matrixOf(0),
  weekend: matrixOf(0),
});

export const newFlat = (): FlatDraft => ({
  periods: [newPeriod()],
  months: Array.from({ length: MONTHS }, () => 0),
});

export const newDraft = (currency: string): TariffDraft => ({
  name: '',
  currency,
  fixedPerMonth: '0',
  energy: newSchedule(),
  monthlyAdjustment: null,
  demand: null,
  flatDemand: null,
});

type Tiers = TariffShape['energy']['periods'][number];

const periodsOf = (periods: readonly Tiers[], names: readonly string[] = []): PeriodDraft[] =>
  periods.map((tiers, index) => ({
    id: index + 1,
    name: names[index] ?? '',
    tiers: tiers.map(({ rate, adjustment, upTo, perDay }) => ({
      rate,
      adjustment,
      upTo: upTo === null ? '' : String(upTo),
      perDay,
    })),
  }));

const scheduleOf = (schedule: TariffShape['energy'], names?: readonly string[]): ScheduleDraft => ({
  periods: periodsOf(schedule.periods, names),
  weekday: schedule.weekday,
  weekend: schedule.weekend,
});

/** A tariff ready to be edited. */
export const draftOf = (shape: TariffShape): TariffDraft => ({
  name: shape.name,
  currency: shape.currency,
  fixedPerMonth: shape.fixedPerMonth,
  energy: scheduleOf(shape.energy, shape.periodNames),
  monthlyAdjustment: shape.monthlyAdjustment,
  demand: shape.demand === null ? null : scheduleOf(shape.demand),
  flatDemand:
    shape.flatDemand === null
      ? null
      : { periods: periodsOf(shape.flatDemand.periods), months: shape.flatDemand.months },
});
