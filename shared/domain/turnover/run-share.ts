import { STANDSTILL_RPM } from '../control/speed-tolerance.ts';
import type { Run } from '../runs/run.ts';

/** The part of a run that lies in a stretch: how long, and its share of the run's energy and water. */
export type RunShare = {
  readonly from: number;
  readonly to: number;
  readonly milliseconds: number;
  readonly share: number;
};

/**
 * The part of a run inside the half-open stretch `from` to `to` (ms); an open run lasts until `to`. undefined where
 * they share no time. A run is one settled speed, so its energy and water are spread evenly over it.
 *
 * @example shareOfRun({ from: 0, to: 100, … }, 50, 400) // { from: 50, to: 100, milliseconds: 50, share: 0.5 }
 */
export function shareOfRun(run: Pick<Run, 'from' | 'to'>, from: number, to: number): RunShare | undefined {
  const end = run.to ?? to;
  const [start, stop] = [Math.max(run.from, from), Math.min(end, to)];
  if (!(start < stop)) return undefined;
  return { from: start, to: stop, milliseconds: stop - start, share: (stop - start) / (end - run.from) };
}

/**
 * Whether a run is one of a turning shaft that the readings saw.
 *
 * @example isTurning({ source: 'no-data', meanRpm: 1700 }) // false
 */
export const isTurning = (run: Pick<Run, 'source' | 'meanRpm'>): boolean =>
  run.source !== 'no-data' && run.meanRpm > STANDSTILL_RPM;
