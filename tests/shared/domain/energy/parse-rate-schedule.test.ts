import { describe, expect, it } from 'vitest';
import { parseRateSchedule } from '#shared/domain/energy/parse-rate-schedule.ts';

const hours = (period: number) => Array.from({ length: 12 }, () => Array.from({ length: 24 }, () => period));
const FILE = {
  name: 'Evening peak',
  energyratestructure: [
    [{ rate: 0.12345, adj: 0.01, max: 10, unit: 'kWh daily' }, { rate: 0.2 }],
    [{ rate: 0.45, sell: 0.1 }],
  ],
  energyweekdayschedule: hours(1),
  energyweekendschedule: hours(0),
  demandratestructure: [[{ rate: 8.5, unit: 'kW' }]],
  demandweekdayschedule: hours(0),
  demandweekendschedule: hours(0),
  flatdemandstructure: [[{ rate: 2 }]],
  flatdemandmonths: Array.from({ length: 12 }, () => 0),
  fixedchargefirstmeter: 0.4,
  fixedchargeunits: '$/day',
  fueladjustmentsmonthly: Array.from({ length: 12 }, () => 0.002),
  sector: 'Residential',
};

describe('open rate schedule', () => {
  it('is read whole, prices to millionths, and says what it does not use', () => {
    const parsed = parseRateSchedule(FILE);

    expect(parsed).toMatchObject({
      ok: true,
      value: {
        unused: ['sector'],
        tariff: {
          currency: 'USD',
          fixedMicrosPerMonth: Math.round((400_000 * 365) / 12),
          energy: {
            periods: [
              [
                { rateMicros: 123_450, adjustmentMicros: 10_000, upTo: 10, perDay: true },
                { rateMicros: 200_000, adjustmentMicros: 0 },
              ],
              [{ rateMicros: 450_000, adjustmentMicros: 0 }],
            ],
          },
          demand: { periods: [[{ rateMicros: 8_500_000 }]] },
          flatDemand: { periods: [[{ rateMicros: 2_000_000 }]] },
          monthlyAdjustmentMicros: Array.from({ length: 12 }, () => 2000),
        },
      },
    });
  });

  it.each([
    ['no object', null, 'not-an-object'],
    ['no energy prices', { ...FILE, energyratestructure: undefined }, 'missing'],
    ['an hour without a period', { ...FILE, energyweekdayschedule: hours(1).slice(0, 3) }, 'hole-in-schedule'],
    [
      'an hour that is null',
      { ...FILE, energyweekdayschedule: hours(1).map((one) => one.map((p, h) => (h === 4 ? null : p))) },
      'hole-in-schedule',
    ],
    [
      'a unit it does not know',
      { ...FILE, energyratestructure: [[{ rate: 1, unit: 'kWh/kW' }], [{ rate: 1 }]] },
      'unit-not-known',
    ],
    ['a fixed charge by the week', { ...FILE, fixedchargeunits: '$/week' }, 'unit-not-known'],
    ['a price in words', { ...FILE, energyratestructure: [[{ rate: 'ten' }], [{ rate: 1 }]] }, 'not-finite'],
    [
      'a last tier with an end',
      { ...FILE, energyratestructure: [[{ rate: 0.1, max: 300 }], [{ rate: 1 }]] },
      'hole-above-last-tier',
    ],
    ['no name', { ...FILE, name: undefined }, 'no-name'],
  ])('refuses %s', (_, file, reason) => {
    const parsed = parseRateSchedule(file);

    expect(parsed.ok ? [] : parsed.refusals.map((one) => one.reason)).toContain(reason);
  });
});
