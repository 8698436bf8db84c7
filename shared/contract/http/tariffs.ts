import { z } from 'zod';
import { Id, Instant } from '../primitives.ts';
import { defineEndpoint, MANAGERS } from './endpoint.ts';
import { LocalDay, MoneyText } from './energy-figures.ts';

/**
 * A tier: `rate` + `adjustment` a kWh (or kW of demand). `upTo` is its upper bound a month (with `perDay`, a day times the
 * days of the month); the last tier has none. Bounds and order are judged by the tariff's own check, which names each hole.
 */
export const RateTierShape = z.object({
  rate: MoneyText,
  adjustment: MoneyText.default('0'),
  upTo: z.number().nullable().default(null),
  perDay: z.boolean().default(false),
});

const Periods = z.array(z.array(RateTierShape).max(20)).max(24);
/** Twelve months of 24 hours, each the number of a period; null or missing is a hole, which the check names. */
const Matrix = z.array(z.array(z.number().int().nullable()).max(48)).max(24);
const Schedule = z.object({ periods: Periods, weekday: Matrix, weekend: Matrix });

/** A tariff as people and the open rate-schedule shape know it, money as text to a millionth of the currency's unit. */
export const TariffShape = z.object({
  name: z.string().trim().max(120),
  currency: z.string().max(3),
  fixedPerMonth: MoneyText.default('0'),
  energy: Schedule,
  /** Added to every kWh, by month. */
  monthlyAdjustment: z.array(MoneyText).max(24).nullable().default(null),
  demand: Schedule.nullable().default(null),
  flatDemand: z
    .object({ periods: Periods, months: z.array(z.number().int().nullable()).max(24) })
    .nullable()
    .default(null),
  /** What people call the periods, by number. */
  periodNames: z.array(z.string().trim().max(40)).max(24).default([]),
});
export type TariffShape = z.infer<typeof TariffShape>;

/** A fault of a tariff: where, its stable name ("hole-in-schedule"), and what is allowed there. */
export const TariffFaultShape = z.object({ field: z.string(), reason: z.string(), allowed: z.string() });

export const TariffRow = z.object({
  id: Id,
  tariff: TariffShape,
  /** Pads that have it now through terms of their own, and whether the company's own terms name it. */
  pads: z.number().int(),
  isCompanys: z.boolean(),
  changedAt: Instant,
  version: z.number().int(),
});
export type TariffRow = z.infer<typeof TariffRow>;

/** From a local day on; each term ends where the next begins, the last one never. `to` is said so that a hole can be named. */
export const TariffTermShape = z.object({ tariffId: Id, from: LocalDay, to: LocalDay.nullable() });

export const TermsShape = z.object({ terms: z.array(TariffTermShape).max(100) });

/** Which tariff when. `version` is for If-Match; 0 where nothing has been said yet. */
export const CompanyTerms = TermsShape.extend({ version: z.number().int() });
export type CompanyTerms = z.infer<typeof CompanyTerms>;

/**
 * A pad's own terms; without any the company's hold (`inherited`). `ownMeter`: nothing but the pad hangs on the meter, so
 * that its fixed charge is the pad's. `otherKwhByPeriod`: what the rest of the meter uses a month, by period; tiers begin
 * above it.
 */
export const PadTermsShape = TermsShape.extend({
  ownMeter: z.boolean().default(false),
  otherKwhByPeriod: z.array(z.number().min(0).max(100_000)).max(24).default([]),
});
export const PadTerms = PadTermsShape.extend({ version: z.number().int(), inherited: z.boolean() });
export type PadTerms = z.infer<typeof PadTerms>;

/** A pad with terms of its own: the tariff that holds there today, null before its first term. */
export const PadWithTerms = z.object({
  padId: Id,
  padName: z.string(),
  customerName: z.string().nullable(),
  zone: z.string(),
  tariffId: Id.nullable(),
  terms: z.number().int(),
});
export type PadWithTerms = z.infer<typeof PadWithTerms>;

/** The grid whose emission factors are used: a region of the list, null = none is shown. */
export const CarbonSettings = z.object({
  region: z.string().max(20).nullable(),
  regions: z.array(z.string()),
  version: z.number().int(),
});

const TariffParams = z.object({ tariffId: Id });
const PadParams = z.object({ padId: Id });

export const tariffEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/tariffs',
    summary: 'The company’s tariffs by name',
    roles: MANAGERS,
    response: z.object({ items: z.array(TariffRow) }),
  }),
  check: defineEndpoint({
    method: 'POST',
    path: '/api/tariffs/check',
    summary: 'Every fault of a tariff, or of an open rate-schedule file, without storing it',
    roles: MANAGERS,
    body: z.union([z.object({ tariff: TariffShape }), z.object({ rateSchedule: z.record(z.string(), z.unknown()) })]),
    response: z.object({
      faults: z.array(TariffFaultShape),
      /** The file as a tariff; null where it cannot be read as one. */
      tariff: TariffShape.nullable(),
      /** Fields of the file that are not used. */
      unused: z.array(z.string()),
    }),
  }),
  create: defineEndpoint({
    method: 'POST',
    path: '/api/tariffs',
    summary: 'Store a tariff; one with a hole is refused by name',
    roles: MANAGERS,
    status: 201,
    body: TariffShape,
    response: TariffRow,
    idempotent: true,
  }),
  read: defineEndpoint({
    method: 'GET',
    path: '/api/tariffs/:tariffId',
    summary: 'One tariff',
    roles: MANAGERS,
    params: TariffParams,
    response: TariffRow,
  }),
  replace: defineEndpoint({
    method: 'PUT',
    path: '/api/tariffs/:tariffId',
    summary: 'Correct a tariff; what was priced by it is priced anew',
    roles: MANAGERS,
    params: TariffParams,
    body: TariffShape,
    response: TariffRow,
    ifMatch: true,
  }),
  remove: defineEndpoint({
    method: 'DELETE',
    path: '/api/tariffs/:tariffId',
    summary: 'Delete a tariff that no term names',
    roles: MANAGERS,
    status: 204,
    params: TariffParams,
    response: z.undefined(),
  }),
  companyTerms: defineEndpoint({
    method: 'GET',
    path: '/api/tariff-terms',
    summary: 'Which tariff holds when, for every pad without terms of its own',
    roles: MANAGERS,
    response: CompanyTerms,
  }),
  replaceCompanyTerms: defineEndpoint({
    method: 'PUT',
    path: '/api/tariff-terms',
    summary: 'Say which tariff holds when; a stretch of time without one is refused by name',
    roles: MANAGERS,
    body: TermsShape,
    response: CompanyTerms,
    ifMatch: true,
  }),
  padsWithTerms: defineEndpoint({
    method: 'GET',
    path: '/api/tariff-terms/pads',
    summary: 'Pads with terms of their own by name, at most 500, and how many there are',
    roles: MANAGERS,
    response: z.object({ items: z.array(PadWithTerms), count: z.number().int() }),
  }),
  padTerms: defineEndpoint({
    method: 'GET',
    path: '/api/pads/:padId/tariff-terms',
    summary: 'Which tariff holds when at a pad',
    roles: MANAGERS,
    params: PadParams,
    response: PadTerms,
  }),
  replacePadTerms: defineEndpoint({
    method: 'PUT',
    path: '/api/pads/:padId/tariff-terms',
    summary: 'Give a pad terms of its own; none = the company’s',
    roles: MANAGERS,
    params: PadParams,
    body: PadTermsShape,
    response: PadTerms,
    ifMatch: true,
  }),
  carbon: defineEndpoint({
    method: 'GET',
    path: '/api/carbon',
    summary: 'The grid whose emission factors are used',
    roles: MANAGERS,
    response: CarbonSettings,
  }),
  replaceCarbon: defineEndpoint({
    method: 'PUT',
    path: '/api/carbon',
    summary: 'Choose the grid whose emission factors are used',
    roles: MANAGERS,
    body: z.object({ region: z.string().max(20).nullable() }),
    response: CarbonSettings,
    ifMatch: true,
  }),
};
