import type { z } from 'zod';
import { monthStart } from '#server/db/day-text.ts';
import type { PadPrices } from '#server/db/tariffs-in-force.ts';
import type { Carbon, Saved, SavedMissing } from '#shared/contract/http/energy-figures.ts';
import { type CarbonPurpose, carbonOf, findCarbonFactor } from '#shared/domain/energy/carbon.ts';
import { toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import type { DayUse } from '#shared/domain/energy/price-days.ts';
import { type SavingsByTerms, saveByTerms, type TermSavings } from '#shared/domain/energy/save-by-terms.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { groupBy } from './group-by.ts';

export type SavedAnswer = {
  readonly saved: Saved | null;
  readonly savedMissing: z.infer<typeof SavedMissing> | null;
};

/** What an amount of energy emits by the latest factor of a grid; null where none is chosen or known for the purpose. */
export function presentCarbon(kwh: number, purpose: CarbonPurpose, region: string | null): Carbon | null {
  const factor = region === null ? undefined : findCarbonFactor(region, purpose);
  const amount = factor && carbonOf(kwh, purpose, factor);
  return amount === undefined ? null : { kilograms: amount.kilograms, factor: { ...amount.factor } };
}

type Money = { readonly currency: string | undefined; readonly shows: boolean };

/** Savings over days, month by month as the months store them, so that a year is the sum of its months. */
export function reckonSavings(
  baseline: Baseline | undefined,
  days: readonly DayUse[],
  prices: PadPrices,
  { money, region }: { readonly money: Money; readonly region: string | null },
): SavedAnswer {
  if (baseline === undefined) return { saved: null, savedMissing: 'no-baseline' };
  const months = groupBy(days, ({ epochDay }) => monthStart(epochDay));
  const outcomes: SavingsByTerms[] = [...months.values()].map((own) =>
    saveByTerms(baseline, own, prices.terms, prices.otherKwhByPeriod),
  );
  const parts = outcomes.flatMap((outcome) => (outcome.ok ? [outcome] : []));
  if (parts.length === 0) {
    const noWater = outcomes.some((outcome) => !outcome.ok && outcome.missing === 'no-water');
    return { saved: null, savedMissing: noWater ? 'no-water' : 'nothing-yet' };
  }
  return { saved: presentSaved(baseline, parts, { money, region }), savedMissing: null };
}

function presentSaved(
  { kind, basis, watts, sigmaWatts }: Baseline,
  parts: readonly TermSavings[],
  { money, region }: { readonly money: Money; readonly region: string | null },
): Saved {
  const sum = (value: (part: TermSavings) => number): number => parts.reduce((total, part) => total + value(part), 0);
  const savedKwh = sum((part) => part.savedKwh);
  const isPriced = money.shows && parts.every(({ savedMicros }) => savedMicros !== undefined);
  const text = (micros: number): string | null => {
    const units = isPriced && money.currency !== undefined ? toMinorUnits(micros, money.currency) : undefined;
    return units === undefined || money.currency === undefined ? null : formatMinor(units, money.currency);
  };
  const [first] = parts;
  return {
    baselineKwh: sum((part) => part.baselineKwh),
    actualKwh: sum((part) => part.actualKwh),
    savedKwh,
    sigmaKwh: sum((part) => part.sigmaKwh),
    saved: text(sum((part) => part.savedMicros ?? 0)),
    sigma: text(sum((part) => part.sigmaMicros ?? 0)),
    method: first?.method ?? 'A',
    stipulated: [...(first?.stipulated ?? [])],
    coverage: sum((part) => part.coverageShare) / parts.length,
    baseline: { kind, basis: basis.kind, watts, sigmaWatts },
    carbon: presentCarbon(savedKwh, 'savings', region),
  };
}
