import type { TariffShape } from '#shared/contract/http/tariffs.ts';
import { formatMicros, parseMoney } from '#shared/domain/energy/money-text.ts';
import type { RateSchedule, RateTier, Tariff } from '#shared/domain/energy/tariff.ts';

type TierShape = TariffShape['energy']['periods'][number][number];
type ScheduleShape = TariffShape['energy'];

const micros = (text: string): number => parseMoney(text) ?? Number.NaN;

const toTier = ({ rate, adjustment, upTo, perDay }: TierShape): RateTier => ({
  rateMicros: micros(rate),
  adjustmentMicros: micros(adjustment),
  ...(upTo === null ? {} : { upTo }),
  ...(perDay ? { perDay } : {}),
});

/** A hole is no number, which the tariff's own check names. */
const toMatrix = (matrix: ScheduleShape['weekday']): number[][] =>
  matrix.map((hours) => hours.map((period) => period ?? Number.NaN));

const toSchedule = ({ periods, weekday, weekend }: ScheduleShape): RateSchedule => ({
  periods: periods.map((tiers) => tiers.map(toTier)),
  weekday: toMatrix(weekday),
  weekend: toMatrix(weekend),
});

/** A tariff as the domain prices by it. Nothing is judged here: `checkTariff` names every fault. */
export function toTariff(shape: TariffShape): Tariff {
  const { name, currency, fixedPerMonth, energy, monthlyAdjustment, demand, flatDemand, periodNames } = shape;
  return {
    name,
    currency,
    fixedMicrosPerMonth: micros(fixedPerMonth),
    energy: toSchedule(energy),
    ...(monthlyAdjustment === null ? {} : { monthlyAdjustmentMicros: monthlyAdjustment.map(micros) }),
    ...(demand === null ? {} : { demand: toSchedule(demand) }),
    ...(flatDemand === null
      ? {}
      : {
          flatDemand: {
            periods: flatDemand.periods.map((tiers) => tiers.map(toTier)),
            months: flatDemand.months.map((period) => period ?? Number.NaN),
          },
        }),
    ...(periodNames.length === 0 ? {} : { periodNames }),
  };
}

const presentTier = ({ rateMicros, adjustmentMicros, upTo, perDay }: RateTier): TierShape => ({
  rate: formatMicros(rateMicros),
  adjustment: formatMicros(adjustmentMicros),
  upTo: upTo ?? null,
  perDay: perDay === true,
});

const presentSchedule = ({ periods, weekday, weekend }: RateSchedule): ScheduleShape => ({
  periods: periods.map((tiers) => tiers.map(presentTier)),
  weekday: weekday.map((hours) => [...hours]),
  weekend: weekend.map((hours) => [...hours]),
});

/** A stored tariff, which is free of faults, as the contract writes it. */
export const presentTariff = (tariff: Tariff): TariffShape => ({
  name: tariff.name,
  currency: tariff.currency,
  fixedPerMonth: formatMicros(tariff.fixedMicrosPerMonth),
  energy: presentSchedule(tariff.energy),
  monthlyAdjustment: tariff.monthlyAdjustmentMicros?.map(formatMicros) ?? null,
  demand: tariff.demand === undefined ? null : presentSchedule(tariff.demand),
  flatDemand:
    tariff.flatDemand === undefined
      ? null
      : {
          periods: tariff.flatDemand.periods.map((tiers) => tiers.map(presentTier)),
          months: [...tariff.flatDemand.months],
        },
  periodNames: [...(tariff.periodNames ?? [])],
});
