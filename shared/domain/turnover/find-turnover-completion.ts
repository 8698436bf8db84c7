import type { Run } from '../runs/run.ts';
import { shareOfRun } from './run-share.ts';

/**
 * When a turnover completes: at an instant (ms), or not in this stretch, with the gallons still missing. `refused`
 * names a pool volume or count that is not above 0.
 */
export type TurnoverCompletion =
  | { readonly kind: 'completed'; readonly at: number }
  | { readonly kind: 'not-yet'; readonly missingGallons: number }
  | { readonly kind: 'refused'; readonly field: 'poolGallons' | 'count'; readonly allowed: string };

/**
 * The instant at which the water moved since `from` (ms) first makes `count` turnovers of a pool (US gallons), within
 * `to`. Runs in order of time; measured or planned ones alike. Runs of unknown flow add nothing.
 *
 * @example findTurnoverCompletion(runs, dayFrom, dayTo, 20_000) // { kind: 'completed', at: 1751390000000 }
 */
export function findTurnoverCompletion(
  runs: readonly Pick<Run, 'from' | 'to' | 'gallons'>[],
  from: number,
  to: number,
  poolGallons: number,
  count = 1,
): TurnoverCompletion {
  const refuse = (field: 'poolGallons' | 'count', allowed: string): TurnoverCompletion => ({
    kind: 'refused',
    field,
    allowed,
  });
  if (!(poolGallons > 0) || !Number.isFinite(poolGallons))
    return refuse('poolGallons', 'a pool volume above 0 gallons');
  if (!(count > 0) || !Number.isFinite(count)) return refuse('count', 'a number of turnovers above 0');
  let missingGallons = poolGallons * count;
  for (const run of runs) {
    const part = shareOfRun(run, from, to);
    const gallons = (run.gallons ?? 0) * (part?.share ?? 0);
    if (part === undefined || !(gallons > 0) || !Number.isFinite(gallons)) continue;
    if (gallons >= missingGallons)
      return { kind: 'completed', at: part.from + (part.milliseconds * missingGallons) / gallons };
    missingGallons -= gallons;
  }
  return { kind: 'not-yet', missingGallons };
}
