import { fitsSpeed } from '../control/speed-tolerance.ts';

/** The filter gauge just after cleaning, at one speed. `at` is an instant in ms. */
export type CleanPressure = { readonly rpm: number; readonly psi: number; readonly at: number };

export type PressureReading = { readonly rpm: number; readonly psi: number };

export type PressureComparison =
  | {
      readonly kind: 'compared';
      readonly cleanPsi: number;
      readonly risePsi: number;
      readonly riseShare: number;
      readonly verdict: 'clean' | 'due' | 'below-clean';
    }
  | { readonly kind: 'no-clean-pressure-at-this-speed'; readonly knownRpm: readonly number[] }
  | { readonly kind: 'refused'; readonly field: string; readonly allowed: string };

/** Clean the filter at a rise of a quarter over its clean pressure, or 10 psi; common practice. */
const DUE = { share: 0.25, psi: 10 };
/** This far under clean the water is held up before the filter (basket, suction) or the gauge is bad; common practice. */
const BELOW_SHARE = -0.25;

/**
 * Compares a filter pressure (psi, 0 to 100) with the latest clean one at the same speed (rpm); pressure goes with the
 * square of speed, so it is never compared across speeds. Without a clean one at this speed it says which it knows.
 *
 * @example compareFilterPressure([{ rpm: 2850, psi: 12, at: 0 }], { rpm: 2850, psi: 16 })
 * // { kind: 'compared', cleanPsi: 12, risePsi: 4, riseShare: 0.333, verdict: 'due' }
 */
export function compareFilterPressure(clean: readonly CleanPressure[], reading: PressureReading): PressureComparison {
  if (!(reading.psi >= 0 && reading.psi <= 100))
    return { kind: 'refused', field: 'psi', allowed: 'a pressure from 0 to 100 psi' };
  if (!(reading.rpm > 0 && reading.rpm <= 4000))
    return { kind: 'refused', field: 'rpm', allowed: 'the speed it was read at, above 0 up to 4000 rpm' };
  const usable = clean.filter(({ psi, rpm, at }) => psi > 0 && psi <= 100 && rpm > 0 && Number.isFinite(at));
  const latest = usable
    .filter(({ rpm }) => fitsSpeed(reading.rpm, rpm))
    .reduce<CleanPressure | undefined>((last, one) => (last === undefined || one.at > last.at ? one : last), undefined);
  if (latest === undefined) {
    const knownRpm = [...new Set(usable.map(({ rpm }) => rpm))].sort((left, right) => left - right);
    return { kind: 'no-clean-pressure-at-this-speed', knownRpm };
  }
  const risePsi = reading.psi - latest.psi;
  const riseShare = risePsi / latest.psi;
  const due = riseShare >= DUE.share || risePsi >= DUE.psi;
  const verdict = due ? 'due' : riseShare <= BELOW_SHARE ? 'below-clean' : 'clean';
  return { kind: 'compared', cleanPsi: latest.psi, risePsi, riseShare, verdict };
}
