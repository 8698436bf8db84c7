import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import { checkTariff, type TariffFault } from './check-tariff.ts';
import type { HourMatrix, RateSchedule, RateTier, Tariff } from './tariff.ts';

export type RateScheduleFault = TariffFault | 'not-an-object' | 'missing' | 'unit-not-known';

/** A tariff as read, and the fields of the file that it does not use. */
export type ParsedRateSchedule = { readonly tariff: Tariff; readonly unused: readonly string[] };

type Json = Readonly<Record<string, unknown>>;
type Faults = Refusal<RateScheduleFault>[];

const MICROS = 1_000_000;
const isObject = (value: unknown): value is Json =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
const isList = (value: unknown): value is readonly unknown[] => Array.isArray(value);

/** Dollars to micros, to the nearest; a price that is no number stays one that `checkTariff` names. */
const toMicros = (value: unknown, missing: number): number =>
  value === undefined ? missing : typeof value === 'number' ? Math.round(value * MICROS) : Number.NaN;

const UNITS: Readonly<Record<string, { readonly perDay: boolean }>> = {
  kWh: { perDay: false },
  'kWh daily': { perDay: true },
  kW: { perDay: false },
};

function parseTier(value: unknown, field: string, faults: Faults): RateTier {
  const { rate, adj, max, unit = 'kWh' } = isObject(value) ? value : {};
  const known = typeof unit === 'string' ? UNITS[unit] : undefined;
  if (known === undefined)
    faults.push({
      reason: 'unit-not-known',
      field: `${field}.unit`,
      allowed: `one of ${Object.keys(UNITS).join(', ')}`,
    });
  return {
    rateMicros: toMicros(rate, Number.NaN),
    adjustmentMicros: toMicros(adj, 0),
    ...(max === undefined ? {} : { upTo: typeof max === 'number' ? max : Number.NaN }),
    ...(known?.perDay === true ? { perDay: true } : {}),
  };
}

function parsePeriods(value: unknown, field: string, faults: Faults): RateTier[][] {
  if (!isList(value)) {
    faults.push({ reason: 'missing', field, allowed: 'a list of periods, each a list of tiers' });
    return [];
  }
  return value.map((period, index) =>
    (isList(period) ? period : []).map((tier, at) => parseTier(tier, `${field}[${index}][${at}]`, faults)),
  );
}

const parseMatrix = (value: unknown): HourMatrix =>
  (isList(value) ? value : []).map((hours) =>
    (isList(hours) ? hours : []).map((period) => (typeof period === 'number' ? period : Number.NaN)),
  );

const parseSchedule = (json: Json, names: readonly [string, string, string], faults: Faults): RateSchedule => ({
  periods: parsePeriods(json[names[0]], names[0], faults),
  weekday: parseMatrix(json[names[1]]),
  weekend: parseMatrix(json[names[2]]),
});

/** A fixed charge a month: given as such, or a day or a year and brought to a month of 365 ÷ 12 days. */
function parseFixed(json: Json, faults: Faults): number {
  const { fixedmonthlycharge, fixedchargefirstmeter, fixedchargeunits = '$/month' } = json;
  if (fixedchargefirstmeter === undefined) return toMicros(fixedmonthlycharge, 0);
  const perMonth = { '$/month': 1, '$/day': 365 / 12, '$/year': 1 / 12 }[String(fixedchargeunits)];
  if (perMonth === undefined)
    faults.push({ reason: 'unit-not-known', field: 'fixedchargeunits', allowed: 'one of $/month, $/day, $/year' });
  return Math.round(toMicros(fixedchargefirstmeter, 0) * (perMonth ?? 1));
}

const FIELDS = {
  energy: ['energyratestructure', 'energyweekdayschedule', 'energyweekendschedule'],
  demand: ['demandratestructure', 'demandweekdayschedule', 'demandweekendschedule'],
  flatDemand: ['flatdemandstructure', 'flatdemandmonths'],
  other: [
    'name',
    'currency',
    'fixedmonthlycharge',
    'fixedchargefirstmeter',
    'fixedchargeunits',
    'fueladjustmentsmonthly',
  ],
} as const;
const USED: ReadonlySet<string> = new Set(Object.values(FIELDS).flat());

/**
 * Reads a tariff from the open rate-schedule shape (`energyratestructure`, `energyweekdayschedule`, …), prices in the
 * currency's unit, to millionths. Refuses with every fault at once: what is missing, units that are not kWh or kWh
 * daily, holes. Fields it does not use are listed, so that nothing is dropped in silence.
 *
 * @example parseRateSchedule({ name: 'TOU', energyratestructure: [[{ rate: 0.2 }]], … })
 * // { ok: true, value: { tariff: { name: 'TOU', currency: 'USD', … }, unused: [] } }
 * Source: open rate-schedule shape: price = rate + adj, `max` the tier's upper kWh.
 */
export function parseRateSchedule(json: unknown): Outcome<ParsedRateSchedule, RateScheduleFault> {
  if (!isObject(json))
    return refused([{ reason: 'not-an-object', field: '', allowed: 'an object of rate-schedule fields' }]);
  const faults: Faults = [];
  const { flatdemandmonths: months, fueladjustmentsmonthly: fuel } = json;
  const tariff: Tariff = {
    name: typeof json.name === 'string' ? json.name : '',
    currency: typeof json.currency === 'string' ? json.currency : 'USD',
    fixedMicrosPerMonth: parseFixed(json, faults),
    energy: parseSchedule(json, FIELDS.energy, faults),
    ...(fuel === undefined
      ? {}
      : { monthlyAdjustmentMicros: (isList(fuel) ? fuel : []).map((one) => toMicros(one, 0)) }),
    ...(json.demandratestructure === undefined ? {} : { demand: parseSchedule(json, FIELDS.demand, faults) }),
    ...(json.flatdemandstructure === undefined
      ? {}
      : {
          flatDemand: {
            periods: parsePeriods(json.flatdemandstructure, 'flatdemandstructure', faults),
            months: (isList(months) ? months : []).map((one) => (typeof one === 'number' ? one : Number.NaN)),
          },
        }),
  };
  faults.push(...checkTariff(tariff));
  if (faults.length > 0) return refused(faults);
  return accepted({ tariff, unused: Object.keys(json).filter((key) => !USED.has(key)) });
}
