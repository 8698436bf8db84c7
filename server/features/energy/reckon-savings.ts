import type { z } from 'zod';
import type { Carbon, Saved, SavedMissing } from '#shared/contract/http/energy-figures.ts';
import { type CarbonPurpose, carbonOf, findCarbonFactor } from '#shared/domain/energy/carbon.ts';
import { toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import type { Baseline } from '#shared/domain/energy/savings-baseline.ts';
import { sumSavings, type TermSavings } from '#shared/domain/energy/sum-savings.ts';
import type { PumpReckoning } from './read-energy.ts';

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

/** What a pump saved over a window, from its days and what they compare to; readings may be known up to `knownTo`. */
export function reckonSavings(
  { baseline, days, compared }: Pick<PumpReckoning, 'baseline' | 'days' | 'compared'>,
  { money, region, knownTo }: { readonly money: Money; readonly region: string | null; readonly knownTo: number },
): SavedAnswer {
  if (baseline === undefined) return { saved: null, savedMissing: 'no-baseline' };
  const savings = sumSavings(baseline, compared);
  if (savings === undefined) {
    const ran = days.some(({ day }) => day.onMs > 0);
    return { saved: null, savedMissing: baseline.basis.kind === 'same-volume' && ran ? 'no-water' : 'nothing-yet' };
  }
  const coverage = coverageOfDays(
    days.map(({ day }) => day),
    knownTo,
  );
  return { saved: { ...presentSaved(baseline, savings, { money, region }), coverage }, savedMissing: null };
}

type CoveredDay = { readonly from: number; readonly to: number; readonly coveredMs: number };

/**
 * The share of some days that readings cover, 0 to 1. What is still to come of today is no gap in them.
 *
 * @example coverageOfDays([{ from: 0, to: 24, coveredMs: 6 }], 6) // 1
 */
export function coverageOfDays(days: readonly CoveredDay[], knownTo: number): number {
  const span = days.reduce((sum, { from, to }) => sum + Math.max(0, Math.min(to, knownTo) - from), 0);
  return span > 0 ? Math.min(1, days.reduce((sum, { coveredMs }) => sum + coveredMs, 0) / span) : 0;
}

function presentSaved(
  { kind, basis, watts, sigmaWatts }: Baseline,
  { savedMicros, sigmaMicros, stipulated, ...savings }: TermSavings,
  { money, region }: { readonly money: Money; readonly region: string | null },
): Omit<Saved, 'coverage'> {
  const { currency } = money;
  const text = (micros: number | undefined): string | null => {
    if (!money.shows || currency === undefined || micros === undefined) return null;
    const units = toMinorUnits(micros, currency);
    return units === undefined ? null : formatMinor(units, currency);
  };
  return {
    ...savings,
    saved: text(savedMicros),
    sigma: text(sigmaMicros),
    stipulated: [...stipulated],
    baseline: { kind, basis: basis.kind, watts, sigmaWatts },
    carbon: presentCarbon(savings.savedKwh, 'savings', region),
  };
}
