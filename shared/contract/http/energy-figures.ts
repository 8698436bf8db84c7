import { z } from 'zod';
import { Instant } from '../primitives.ts';
import { RunSourceName } from './runs.ts';

/** Money in the currency's own unit and decimals, as text, so that no binary fraction creeps in: "12.34", "-0.50". */
export const MoneyText = z.string().regex(/^-?\d{1,12}(\.\d{1,6})?$/, 'an amount such as 12.34');
export type MoneyText = z.infer<typeof MoneyText>;

/** A local calendar day of the pad's zone: "2026-11-30". */
export const LocalDay = z.iso.date();
/** A local calendar month: "2026-11". */
export const LocalMonth = z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, 'a month such as 2026-11');

/**
 * Whether an answer names money. `withheld`: it is not the reader's to see (their figures are without it);
 * `no-tariff`: nobody has said what a kWh costs there, or not for all of the time asked for.
 */
export const MoneyState = z.enum(['shown', 'withheld', 'no-tariff']);

/**
 * Water that the flow meter could tell, US gallons. `unknownSeconds` is time the shaft turned while it could not:
 * above 0 the gallons are the least there was. `sigmaGallons` is one sigma; null where it is not known.
 */
export const Water = z.object({
  gallons: z.number(),
  sigmaGallons: z.number().nullable(),
  unknownSeconds: z.number(),
});

/**
 * What a stretch of time used. Energy, time and water are of the covered time alone: nothing is filled in for a gap.
 * Coverage is `coveredSeconds` of `seconds`; time still to come is not asked for. Speeds and watts are means over the
 * time the pump turned, extremes over all of it; null where it did not.
 */
export const EnergyFigures = z.object({
  seconds: z.number(),
  coveredSeconds: z.number(),
  onSeconds: z.number(),
  kwh: z.number(),
  /** kWh by tariff period, in the order of the answer's `periods`; empty without a tariff. */
  kwhByPeriod: z.array(z.number()),
  /** The energy and the demand of it; null where money is not shown. Parts add up to their whole to the cent. */
  cost: MoneyText.nullable(),
  water: Water.nullable(),
  turnovers: z.number().nullable(),
  secondsBySource: z.partialRecord(RunSourceName, z.number()),
  meanRpm: z.number().nullable(),
  leastRpm: z.number().nullable(),
  mostRpm: z.number().nullable(),
  meanWatts: z.number().nullable(),
  mostWatts: z.number().nullable(),
});
export type EnergyFigures = z.infer<typeof EnergyFigures>;

/** A tariff period with its share of the stretch; `name` is what the company calls it ("Peak") or "Period 2". */
export const PeriodFigures = z.object({ name: z.string(), kwh: z.number(), cost: MoneyText.nullable() });

/** What energy emits, with the factor it was reckoned by and so its year. `savings` takes the non-baseload rate. */
export const Carbon = z.object({
  kilograms: z.number(),
  factor: z.object({
    region: z.string(),
    year: z.number().int(),
    gas: z.enum(['CO2', 'CO2e']),
    rate: z.enum(['average', 'non-baseload']),
    kilogramsPerKwh: z.number(),
  }),
});
export type Carbon = z.infer<typeof Carbon>;

/** What the pump used before, as `baselines.ts` states it, in short. */
export const BASELINE_KINDS = ['clamped', 'nameplate', 'logged'] as const;
export const BASELINE_BASES = ['same-hours', 'same-volume'] as const;

/**
 * What was saved against the stated baseline, one sigma beside it. Below 0 it cost more. `method` after the IPMVP: B where
 * both sides were measured, A where something is stipulated, which `stipulated` names.
 */
export const Saved = z.object({
  baselineKwh: z.number(),
  actualKwh: z.number(),
  savedKwh: z.number(),
  sigmaKwh: z.number(),
  saved: MoneyText.nullable(),
  sigma: MoneyText.nullable(),
  method: z.enum(['A', 'B']),
  stipulated: z.array(z.enum(['baseline-watts', 'baseline-hours', 'baseline-flow'])),
  /** Part of the time that readings cover, 0 to 1. */
  coverage: z.number(),
  baseline: z.object({
    kind: z.enum(BASELINE_KINDS),
    basis: z.enum(BASELINE_BASES),
    watts: z.number(),
    sigmaWatts: z.number(),
  }),
  carbon: Carbon.nullable(),
});
export type Saved = z.infer<typeof Saved>;

/** Why nothing is said of savings: nobody stated a baseline, its water is not known, or there is no tariff or no use yet. */
export const SavedMissing = z.enum(['no-baseline', 'no-water', 'nothing-yet']);

/** A fixed charge of the meter over the days asked for: it belongs to the pad, not to a pump. */
export const FixedCharge = z.object({ days: z.number().int(), cost: MoneyText });

/** A tariff that was in force in the stretch; null = from the beginning, still. */
export const TariffInForce = z.object({
  id: z.uuid(),
  name: z.string(),
  from: Instant.nullable(),
  to: Instant.nullable(),
});
