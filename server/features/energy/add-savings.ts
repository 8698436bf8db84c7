import type { Saved } from '#shared/contract/http/energy-figures.ts';
import { formatMicros, parseMoney } from '#shared/domain/energy/money-text.ts';

function addMoney(left: string | null, right: string | null): string | null {
  if (left === null || right === null) return null;
  const [one, other] = [parseMoney(left), parseMoney(right)];
  if (one === undefined || other === undefined) return null;
  const decimals = left.split('.')[1]?.length ?? 0;
  return decimals === 0 ? formatMicros(one + other) : ((one + other) / 1_000_000).toFixed(decimals);
}

/** What several pumps of a pad saved together. Their baselines err apart from one another, so sigmas add as squares. */
export function addSavings(parts: readonly Saved[]): Saved | null {
  const [first, ...others] = parts;
  return first === undefined ? null : others.reduce(addTwo, first);
}

const addTwo = (sum: Saved, part: Saved): Saved => ({
  baselineKwh: sum.baselineKwh + part.baselineKwh,
  actualKwh: sum.actualKwh + part.actualKwh,
  savedKwh: sum.savedKwh + part.savedKwh,
  sigmaKwh: Math.hypot(sum.sigmaKwh, part.sigmaKwh),
  saved: addMoney(sum.saved, part.saved),
  sigma: sum.sigma === null || part.sigma === null ? null : hypotMoney(sum.sigma, part.sigma),
  method: sum.method === 'A' || part.method === 'A' ? 'A' : 'B',
  stipulated: [...new Set([...sum.stipulated, ...part.stipulated])],
  coverage: Math.min(sum.coverage, part.coverage),
  baseline: sum.baseline,
  carbon:
    sum.carbon === null || part.carbon === null
      ? null
      : { ...sum.carbon, kilograms: sum.carbon.kilograms + part.carbon.kilograms },
});

function hypotMoney(left: string, right: string): string {
  const decimals = left.split('.')[1]?.length ?? 0;
  return Math.hypot(Number(left), Number(right)).toFixed(decimals);
}
