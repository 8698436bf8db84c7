import { z } from 'zod';
import { Id, Instant, pageOf, pageQuery } from '../primitives.ts';
import { defineEndpoint, MANAGERS } from './endpoint.ts';
import { HourMap, MonthQuery } from './energy.ts';
import { Carbon, LocalDay, LocalMonth, MoneyText, PeriodFigures } from './energy-figures.ts';

/** Sums of what was saved, over the pumps that have a baseline; one sigma beside it. */
const FleetSaved = z.object({
  pumps: z.number().int(),
  savedKwh: z.number(),
  sigmaKwh: z.number(),
  saved: MoneyText.nullable(),
  sigma: MoneyText.nullable(),
  carbon: Carbon.nullable(),
});

/**
 * A calendar month of the whole company: each pad's own local days, each pump under its own tariff. Sums of what the
 * pads show, to the cent. `priced` of `pumps` have a tariff; of several currencies only the commonest is summed and
 * `otherCurrencies` says how many pumps are left out of the money.
 */
export const FleetEnergy = z.object({
  month: LocalMonth,
  upTo: Instant.nullable(),
  currency: z.string().nullable(),
  pumps: z.number().int(),
  priced: z.number().int(),
  otherCurrencies: z.number().int(),
  /** Pumps whose figures are being worked out anew: a tariff or a baseline changed, or late readings came. */
  pending: z.number().int(),
  kwh: z.number(),
  cost: MoneyText.nullable(),
  seconds: z.number(),
  coveredSeconds: z.number(),
  onSeconds: z.number(),
  gallons: z.number().nullable(),
  saved: FleetSaved.nullable(),
  carbon: Carbon.nullable(),
  /** Periods of the same name together, dearest first. */
  periods: z.array(PeriodFigures),
  days: z.array(z.object({ day: LocalDay, kwh: z.number(), pumps: z.number().int() })),
  previous: z.object({ month: LocalMonth, kwh: z.number(), cost: MoneyText.nullable() }).nullable(),
  /** First month there is anything of; null before the first reading. */
  firstMonth: LocalMonth.nullable(),
  serverNow: Instant,
});
export type FleetEnergy = z.infer<typeof FleetEnergy>;

/** Worst first in its own sense: dearest, most kWh, least saved, largest rise against the month before, least covered. */
export const PAD_ENERGY_SORTS = ['cost', 'kwh', 'per-volume', 'rise', 'saved', 'coverage', 'name'] as const;

export const PadMonthQuery = z.object({
  month: LocalMonth.optional(),
  sort: z.enum(PAD_ENERGY_SORTS).default('cost'),
  q: z.string().trim().max(100).optional(),
  area: z.string().max(60).optional(),
  ...pageQuery(200, 50),
});
export type PadMonthQuery = z.infer<typeof PadMonthQuery>;

export const PadMonth = z.object({
  padId: Id,
  padName: z.string(),
  customerName: z.string().nullable(),
  area: z.string().nullable(),
  pumps: z.number().int(),
  kwh: z.number(),
  currency: z.string().nullable(),
  cost: MoneyText.nullable(),
  /** kWh of the month before over as many days as this one has behind it; null without. */
  previousKwh: z.number().nullable(),
  gallons: z.number().nullable(),
  /** kWh a thousand gallons; null where the flow is not known for most of the time. */
  kwhPerThousandGallons: z.number().nullable(),
  turnoversPerDay: z.number().nullable(),
  wantedTurnoversPerDay: z.number().nullable(),
  savedKwh: z.number().nullable(),
  saved: MoneyText.nullable(),
  /** 0 to 1. */
  coverage: z.number(),
});
export type PadMonth = z.infer<typeof PadMonth>;

export const fleetEnergyEndpoints = {
  month: defineEndpoint({
    method: 'GET',
    path: '/api/energy',
    summary: 'A month of the whole company: energy, money, saved',
    roles: MANAGERS,
    query: MonthQuery,
    response: FleetEnergy,
  }),
  hours: defineEndpoint({
    method: 'GET',
    path: '/api/energy/hours',
    summary: 'A month of the whole company hour by hour',
    roles: MANAGERS,
    query: MonthQuery,
    response: HourMap,
  }),
  pads: defineEndpoint({
    method: 'GET',
    path: '/api/energy/pads',
    summary: 'A month pad by pad, the dearest first unless asked otherwise',
    roles: MANAGERS,
    query: PadMonthQuery,
    response: pageOf(PadMonth).extend({ month: LocalMonth, matching: z.number().int(), serverNow: Instant }),
  }),
};
