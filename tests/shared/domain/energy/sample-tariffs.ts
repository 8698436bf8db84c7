import type { HourMatrix, Tariff } from '#shared/domain/energy/tariff.ts';

const months = (hours: (month: number, hour: number) => number): HourMatrix =>
  Array.from({ length: 12 }, (_, month) => Array.from({ length: 24 }, (__, hour) => hours(month, hour)));

/** One price with two tiers: 0.10 up to 300 kWh a month, 0.25 above. */
export const TWO_TIER: Tariff = {
  name: 'Two tiers',
  currency: 'USD',
  fixedMicrosPerMonth: 12_000_000,
  energy: {
    periods: [
      [
        { rateMicros: 90_000, adjustmentMicros: 10_000, upTo: 300 },
        { rateMicros: 240_000, adjustmentMicros: 10_000 },
      ],
    ],
    weekday: months(() => 0),
    weekend: months(() => 0),
  },
};

/** Off-peak 0.12, peak 0.48 on weekdays 16 to 21 h from June to September, mid 0.30 in the same hours otherwise. */
export const TIME_OF_USE: Tariff = {
  name: 'Time of use',
  currency: 'USD',
  fixedMicrosPerMonth: 0,
  energy: {
    periods: [
      [{ rateMicros: 120_000, adjustmentMicros: 0 }],
      [{ rateMicros: 300_000, adjustmentMicros: 0 }],
      [{ rateMicros: 480_000, adjustmentMicros: 0 }],
    ],
    weekday: months((month, hour) => (hour < 16 || hour >= 21 ? 0 : month >= 5 && month <= 8 ? 2 : 1)),
    weekend: months(() => 0),
  },
  periodNames: ['off-peak', 'mid-peak', 'peak'],
};
