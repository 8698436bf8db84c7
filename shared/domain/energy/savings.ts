import { checkNumbers, type NumberFault } from '../refusal/check-number.ts';
import { accepted, type Outcome, type Refusal, refused } from '../refusal/refusal.ts';
import { HOUR_MS } from '../time/local-time.ts';
import type { HourUsage } from './hour-usage.ts';
import type { Micros } from './money.ts';
import { type PricingFault, type PricingOptions, priceEnergy } from './price-energy.ts';
import type { Baseline } from './savings-baseline.ts';
import type { Tariff } from './tariff.ts';

/** What the motor now in place used, and one sigma of its meter and its flow as shares. */
export type ActualUse = {
  readonly usage: readonly HourUsage[];
  readonly meterSigmaShare: number;
  readonly flowSigmaShare?: number | undefined;
};

/**
 * What was saved, with one sigma. `method` after the IPMVP: B where both sides were measured, A where something is
 * stipulated (named). Savings are of covered time alone: nothing is filled in for gaps. Below 0 it cost more.
 */
export type Savings = {
  readonly baselineKwh: number;
  readonly actualKwh: number;
  readonly savedKwh: number;
  readonly sigmaKwh: number;
  readonly savedMicros: Micros;
  readonly sigmaMicros: Micros;
  readonly method: 'A' | 'B';
  readonly stipulated: readonly ('baseline-watts' | 'baseline-hours' | 'baseline-flow')[];
  readonly coverageShare: number;
};

export type SavingsFault = PricingFault | NumberFault | 'no-water';

const STIPULATED = {
  logged: [],
  clamped: ['baseline-hours'],
  nameplate: ['baseline-watts', 'baseline-hours'],
} as const satisfies Record<Baseline['kind'], Savings['stipulated']>;

/**
 * Every number of a baseline that is out of range, by name.
 *
 * @example checkBaseline({ ...baseline, watts: -1 })[0]?.field // 'baseline.watts'
 */
export function checkBaseline({ watts, sigmaWatts, basis }: Baseline): Refusal<SavingsFault>[] {
  const flow = basis.kind === 'same-volume' ? basis : undefined;
  return checkNumbers([
    [watts, { field: 'baseline.watts', unit: 'W', above: 0, most: 10_000 }],
    [sigmaWatts, { field: 'baseline.sigmaWatts', unit: 'W', least: 0 }],
    [flow?.gpm ?? 1, { field: 'baseline.basis.gpm', unit: 'gpm', above: 0 }],
    [flow?.sigmaGpm ?? 0, { field: 'baseline.basis.sigmaGpm', unit: 'gpm', least: 0 }],
  ]);
}

const sumOf = (usage: readonly HourUsage[], value: (hour: HourUsage) => number): number =>
  usage.reduce((sum, hour) => sum + value(hour), 0);

/**
 * The old motor's hours per hour that the new one runs: 1 for the same hours, else what the same water takes; undefined
 * where that is not known.
 *
 * @example hoursRatio({ kind: 'same-volume', gpm: 60, sigmaGpm: 5 }, anHourAtThirtyGpm) // 0.5
 */
export function hoursRatio(basis: Baseline['basis'], usage: readonly HourUsage[]): number | undefined {
  if (basis.kind === 'same-hours') return 1;
  const minutes = sumOf(usage, (hour) => hour.turningMs) / 60_000;
  const gallons = sumOf(usage, (hour) => hour.gallons);
  return gallons > 0 && minutes > 0 ? gallons / basis.gpm / minutes : undefined;
}

/**
 * What of a baseline nobody measured.
 *
 * @example stipulatedBy({ kind: 'clamped', watts: 2000, sigmaWatts: 60, basis: { kind: 'same-hours' } }) // ['baseline-hours']
 */
export const stipulatedBy = ({ kind, basis }: Baseline): Savings['stipulated'] => [
  ...STIPULATED[kind],
  ...(basis.kind === 'same-volume' ? (['baseline-flow'] as const) : []),
];

/** One sigma of the baseline as a share: its watts, and for the same water both flows. */
function baselineSigmaShare({ watts, sigmaWatts, basis }: Baseline, flowSigmaShare: number): number {
  const flow = basis.kind === 'same-volume' ? Math.hypot(basis.sigmaGpm / basis.gpm, flowSigmaShare) : 0;
  return Math.hypot(sigmaWatts / watts, flow);
}

/**
 * One sigma of a difference between what the old motor would have used (or cost) and what the new one did, in the same
 * unit; `shares` are one sigma of the meter and of its flow, as shares.
 *
 * @example sigmaOfSavings(baseline, { meter: 0.02, flow: 0 }, { before: 400, after: 100 }) // 12.2, of watts known to 3 %
 */
export const sigmaOfSavings = (
  baseline: Baseline,
  shares: { readonly meter: number; readonly flow: number },
  { before, after }: { readonly before: number; readonly after: number },
): number => Math.hypot(baselineSigmaShare(baseline, shares.flow) * before, shares.meter * after);

/**
 * What was saved against a stated baseline, in kWh and in money (micros) under one tariff: the old motor's watts over
 * the same hours, or over the hours that the same water would have taken it, laid on
 * the very hours that the new one ran. Refuses a baseline that is not above 0, a tariff with a hole, or the same water where none is known.
 *
 * @example computeSavings(baseline, { usage, meterSigmaShare: 0.02 }, tariff)
 * // { ok: true, value: { savedKwh: 310, sigmaKwh: 24, method: 'A', stipulated: ['baseline-hours'], … } }
 * Source: IPMVP options A and B, retrofit isolation (from memory).
 */
export function computeSavings(
  baseline: Baseline,
  actual: ActualUse,
  tariff: Tariff,
  options: PricingOptions = {},
): Outcome<Savings, SavingsFault> {
  const { usage, meterSigmaShare, flowSigmaShare = 0 } = actual;
  const faults: Refusal<SavingsFault>[] = [
    ...checkBaseline(baseline),
    ...checkNumbers([
      [meterSigmaShare, { field: 'meterSigmaShare', unit: '', least: 0, most: 1 }],
      [flowSigmaShare, { field: 'flowSigmaShare', unit: '', least: 0, most: 1 }],
    ]),
  ];
  const ratio = hoursRatio(baseline.basis, usage);
  if (ratio === undefined)
    faults.push({ reason: 'no-water', field: 'usage', allowed: 'gallons above 0 while the pump turned' });
  if (faults.length > 0 || ratio === undefined) return refused(faults);

  const before = usage.map((hour) => ({ ...hour, wattHours: (baseline.watts * ratio * hour.turningMs) / HOUR_MS }));
  const [old, now] = [priceEnergy(tariff, before, options), priceEnergy(tariff, usage, options)];
  if (!old.ok) return old;
  if (!now.ok) return now;
  const shares = { meter: meterSigmaShare, flow: flowSigmaShare };
  const sigma = (of: 'kwh' | 'micros') =>
    sigmaOfSavings(baseline, shares, { before: old.value[of], after: now.value[of] });
  const stipulated = stipulatedBy(baseline);
  return accepted({
    baselineKwh: old.value.kwh,
    actualKwh: now.value.kwh,
    savedKwh: old.value.kwh - now.value.kwh,
    sigmaKwh: sigma('kwh'),
    savedMicros: old.value.micros - now.value.micros,
    sigmaMicros: sigma('micros'),
    method: stipulated.length === 0 ? 'B' : 'A',
    stipulated,
    coverageShare:
      sumOf(usage, (hour) => hour.coveredMs) /
      Math.max(
        1,
        sumOf(usage, (hour) => hour.to - hour.from),
      ),
  });
}
