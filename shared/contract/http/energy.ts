import { z } from 'zod';
import { Id, Instant } from '../primitives.ts';
import { defineEndpoint, EVERYONE } from './endpoint.ts';
import {
  Carbon,
  EnergyFigures,
  FixedCharge,
  LocalDay,
  LocalMonth,
  MoneyState,
  MoneyText,
  PeriodFigures,
  Saved,
  SavedMissing,
  TariffInForce,
} from './energy-figures.ts';

const DAY_MS = 86_400_000;

/**
 * Local days of the pad's zone, `until` not included. Without either: from the first of the present month to today. By day
 * at most 800 days (hours are kept for two years), by month at most 240 months.
 */
export const EnergyQuery = z
  .object({ from: LocalDay.optional(), until: LocalDay.optional(), by: z.enum(['day', 'month']).default('day') })
  .refine(({ from, until }) => (from === undefined) === (until === undefined), {
    message: 'from and until come together',
    path: ['until'],
  })
  .refine(({ from, until }) => from === undefined || until === undefined || from < until, {
    message: 'until must lie after from',
    path: ['until'],
  })
  .refine(
    ({ from, until, by }) =>
      from === undefined ||
      until === undefined ||
      Date.parse(until) - Date.parse(from) <= (by === 'day' ? 800 : 7320) * DAY_MS,
    { message: 'at most 800 days, or 240 months by month', path: ['until'] },
  );
export type EnergyQuery = z.infer<typeof EnergyQuery>;

/** One local day or calendar month; `from` and `to` are its instants: a day may have 23 or 25 hours. */
export const EnergySpan = EnergyFigures.extend({ label: z.string(), from: Instant, to: Instant });
export type EnergySpan = z.infer<typeof EnergySpan>;

const EnergyAnswer = z.object({
  zone: z.string(),
  from: LocalDay,
  until: LocalDay,
  by: z.enum(['day', 'month']),
  /** Readings up to here are counted in; null before the first. */
  upTo: Instant.nullable(),
  money: MoneyState,
  /** ISO 4217; null where money is not shown. */
  currency: z.string().nullable(),
  tariffs: z.array(TariffInForce),
  periods: z.array(PeriodFigures),
  totals: EnergyFigures,
  spans: z.array(EnergySpan),
  saved: Saved.nullable(),
  savedMissing: SavedMissing.nullable(),
  carbon: Carbon.nullable(),
  serverNow: Instant,
});

/** Stretches without readings, the longest first, at most 50 of them; `gapCount` is how many there are in all. */
export const PumpEnergy = EnergyAnswer.extend({
  pumpId: Id,
  gaps: z.array(z.object({ from: Instant, to: Instant })),
  gapCount: z.number().int(),
});
export type PumpEnergy = z.infer<typeof PumpEnergy>;

export const PadEnergy = EnergyAnswer.extend({
  padId: Id,
  padName: z.string(),
  poolGallons: z.number().nullable(),
  turnoversPerDay: z.number().nullable(),
  /** Only where the pad has a meter of its own. */
  fixedCharge: FixedCharge.nullable(),
  pumps: z.array(z.object({ pumpId: Id, pumpName: z.string(), totals: EnergyFigures, saved: Saved.nullable() })),
});
export type PadEnergy = z.infer<typeof PadEnergy>;

/**
 * The hours of the days: watt-hours of each wall-clock hour 0 to 23; null where no reading covers it. Of a day with 25
 * hours the doubled hour is one cell, of one with 23 the skipped one is null.
 */
export const HourCells = z.object({ day: LocalDay, wattHours: z.array(z.number().nullable()).length(24) });

export const HourMap = z.object({
  days: z.array(HourCells),
  /** The price of a first kWh in each hour of the month's weekdays and weekends; null where money is not shown, or many tariffs. */
  prices: z
    .object({
      currency: z.string(),
      weekday: z.array(MoneyText).length(24),
      weekend: z.array(MoneyText).length(24),
    })
    .nullable(),
  serverNow: Instant,
});
export type HourMap = z.infer<typeof HourMap>;

/** A local month; the present one unless asked otherwise. */
export const MonthQuery = z.object({ month: LocalMonth.optional() });

const PumpParams = z.object({ pumpId: Id });
const PadParams = z.object({ padId: Id });

export const energyEndpoints = {
  pump: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/energy',
    summary: 'What a pump used, by local day or month: energy, cost, water, saved',
    roles: EVERYONE,
    params: PumpParams,
    query: EnergyQuery,
    response: PumpEnergy,
  }),
  pumpHours: defineEndpoint({
    method: 'GET',
    path: '/api/pumps/:pumpId/energy/hours',
    summary: 'A month of a pump hour by hour',
    roles: EVERYONE,
    params: PumpParams,
    query: MonthQuery,
    response: HourMap,
  }),
  pad: defineEndpoint({
    method: 'GET',
    path: '/api/pads/:padId/energy',
    summary: 'What a pad used, all its pumps together and one by one',
    roles: EVERYONE,
    params: PadParams,
    query: EnergyQuery,
    response: PadEnergy,
  }),
  padHours: defineEndpoint({
    method: 'GET',
    path: '/api/pads/:padId/energy/hours',
    summary: 'A month of a pad hour by hour',
    roles: EVERYONE,
    params: PadParams,
    query: MonthQuery,
    response: HourMap,
  }),
};
