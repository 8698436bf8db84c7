import type { HourMatrix, Tariff } from '#shared/domain/energy/tariff.ts';
import type { DemoBaseline, DemoEnergy, DemoPad } from './demo-company.ts';

/** June to September, 0 = January. */
const isSummer = (month: number): boolean => month >= 5 && month <= 8;

const hours = (periodAt: (month: number, hour: number) => number): HourMatrix =>
  Array.from({ length: 12 }, (_, month) => Array.from({ length: 24 }, (__, hour) => periodAt(month, hour)));

const price = (rateMicros: number) => [{ rateMicros, adjustmentMicros: 0 }];

/** Peak on weekdays from 16 to 21 h in summer, mid-peak in the same hours otherwise; nights are cheapest. */
const timeOfUse = (name: string, [night, day, mid, peak]: readonly [number, number, number, number]): Tariff => ({
  name,
  currency: 'USD',
  fixedMicrosPerMonth: 11_500_000,
  energy: {
    periods: [price(night), price(day), price(mid), price(peak)],
    weekday: hours((month, hour) => (hour < 7 ? 0 : hour < 16 || hour >= 21 ? 1 : isSummer(month) ? 3 : 2)),
    weekend: hours((_month, hour) => (hour < 7 ? 0 : 1)),
  },
  periodNames: ['Night', 'Day', 'Mid-peak', 'Peak'],
});

const TIERS: Tariff = {
  name: 'Tarnwick Residential, tiers',
  currency: 'USD',
  fixedMicrosPerMonth: 9_000_000,
  energy: {
    periods: [
      [
        { rateMicros: 186_000, adjustmentMicros: 4_200, upTo: 14, perDay: true },
        { rateMicros: 274_000, adjustmentMicros: 4_200 },
      ],
    ],
    weekday: hours(() => 0),
    weekend: hours(() => 0),
  },
  periodNames: ['All hours'],
};

const DEMAND: Tariff = {
  name: 'Tarnwick Small Commercial, demand',
  currency: 'USD',
  fixedMicrosPerMonth: 32_000_000,
  energy: {
    periods: [price(118_000), price(163_000)],
    weekday: hours((_month, hour) => (hour >= 8 && hour < 20 ? 1 : 0)),
    weekend: hours(() => 0),
  },
  flatDemand: { periods: [price(9_400_000)], months: Array.from({ length: 12 }, () => 0) },
  periodNames: ['Off-peak', 'On-peak'],
};

/** Half of the filter pumps were clamped before the old motor left, a quarter only left their plate, of some nobody knows. */
function listBaselines(pads: readonly DemoPad[]): DemoBaseline[] {
  const filters = pads.flatMap(({ pumps }) => pumps.filter(({ purpose }) => purpose === 'filter'));
  return filters.flatMap(({ serial }, index): DemoBaseline[] => {
    const basis = { kind: 'same-hours' } as const;
    if (index % 4 === 3) return [];
    if (index % 4 === 1)
      return [
        { serial, kind: 'nameplate', horsepower: 1.5, serviceFactor: 1.1, basis, note: 'Old plate: 1½ hp, 1.10' },
      ];
    const watts = 1480 + ((index * 97) % 420);
    return [{ serial, kind: 'clamped', watts, sigmaWatts: 30, basis, note: 'Clamped on the day of the change' }];
  });
}

/** What Larkmoor's customers pay: an invented utility, its tariffs and who has which. */
export const larkmoorEnergy = (pads: readonly DemoPad[]): DemoEnergy => ({
  tariffs: [
    { key: 'tou-2025', tariff: timeOfUse('Tarnwick Time of Use 2025', [176_000, 238_000, 301_000, 446_000]) },
    { key: 'tou-2026', tariff: timeOfUse('Tarnwick Time of Use 2026', [182_000, 251_000, 322_000, 489_000]) },
    { key: 'tiers', tariff: TIERS },
    { key: 'demand', tariff: DEMAND },
  ],
  companyTerms: [
    { tariff: 'tou-2025', from: '2024-01-01', to: '2026-04-01' },
    { tariff: 'tou-2026', from: '2026-04-01', to: null },
  ],
  padTerms: [
    { pad: 'Sagebrush Loop 204', tariff: 'tiers', from: '2024-01-01', ownMeter: false, otherKwhByPeriod: [380] },
    { pad: 'Weir House', tariff: 'tiers', from: '2024-01-01', ownMeter: false, otherKwhByPeriod: [510] },
    { pad: 'Windmill Yard 1', tariff: 'demand', from: '2024-01-01', ownMeter: true, otherKwhByPeriod: [] },
  ],
  baselines: listBaselines(pads),
  carbonRegion: 'US',
});
