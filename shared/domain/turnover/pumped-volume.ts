import type { Run } from '../runs/run.ts';
import { isTurning, shareOfRun } from './run-share.ts';

/**
 * Water moved in a stretch of time. `unknownMs` is time the shaft turned while the readings could not tell the flow:
 * while it is not 0 the gallons are the least there was.
 */
export type PumpedVolume = {
  readonly gallons: number;
  readonly turningMs: number;
  readonly unknownMs: number;
  readonly coveredMs: number;
};

const knownGallons = (gallons: number | undefined): number | undefined =>
  gallons !== undefined && Number.isFinite(gallons) && gallons >= 0 ? gallons : undefined;

/**
 * The water (US gallons) that runs moved between two instants (ms), the parts of runs by their time. A run whose
 * gallons are unknown, negative or not finite counts as time unknown. All zero where `from` is not before `to`.
 *
 * @example sumPumpedVolume(runs, dayFrom, dayTo) // { gallons: 21_400, turningMs: 36_000_000, unknownMs: 0, … }
 */
export function sumPumpedVolume(runs: readonly Run[], from: number, to: number): PumpedVolume {
  let [gallons, turningMs, unknownMs, coveredMs] = [0, 0, 0, 0];
  for (const run of runs) {
    const part = shareOfRun(run, from, to);
    if (part === undefined || run.source === 'no-data') continue;
    coveredMs += part.milliseconds;
    if (!isTurning(run)) continue;
    turningMs += part.milliseconds;
    const known = knownGallons(run.gallons);
    if (known === undefined) unknownMs += part.milliseconds;
    else gallons += known * part.share;
  }
  return { gallons, turningMs, unknownMs, coveredMs };
}
