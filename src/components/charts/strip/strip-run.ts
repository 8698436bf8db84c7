import type { PlannedRun, Run } from '#shared/contract/http/runs.ts';

/** What the strip needs of a run. */
export type StripRun = Pick<
  Run,
  | 'from'
  | 'to'
  | 'source'
  | 'expectedSource'
  | 'closedInputs'
  | 'activeInput'
  | 'expectedRpm'
  | 'meanRpm'
  | 'meanWatts'
  | 'flags'
>;
export type StripPlan = PlannedRun;

/** A stretch of time on the paper, half-open, ms. */
export type StripWindow = { readonly from: number; readonly until: number };

export { STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';

/**
 * The run that holds an instant; `now` ends the one still open. Undefined where nothing is known.
 *
 * @example runAt([{ ...run, from: 0, to: 10 }], 5, 20) // that run
 */
export function runAt<Each extends Pick<StripRun, 'from' | 'to'>>(
  runs: readonly Each[],
  at: number,
  now: number,
): Each | undefined {
  return runs.find((run) => run.from <= at && at < (run.to ?? Math.max(now, run.from)));
}

/** The runs behind a strip on their way: `runs` is undefined until they have come. */
export type StripState = {
  readonly runs: readonly Run[] | undefined;
  readonly planned: readonly PlannedRun[];
  readonly failed: boolean;
};
