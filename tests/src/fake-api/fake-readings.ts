import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';

type Query = { readonly from: number; readonly until: number; readonly width: number };

/** Chart columns that follow a pump's runs, with a little noise. */
export function readingsOf(runs: readonly Run[], { from, until, width }: Query, now: number): ReadingSeries {
  const bucketMs = Math.ceil((until - from) / width);
  const t = Array.from({ length: width }, (_, index) => from + index * bucketMs).filter(
    (at) => at < Math.min(until, now),
  );
  const runAt = t.map((at) => runs.find((run) => run.from <= at && at < (run.to ?? now)));
  const seen = runAt.map((run) => (run?.source === 'no-data' ? undefined : run));
  const noise = (index: number) => ((index * 37) % 11) - 5;
  const column = (of: (run: Run, index: number) => number) =>
    seen.map((run, index) => (run === undefined ? null : of(run, index)));
  const still = (run: Run) => run.meanRpm < 40;
  const rpm = column((run, index) => (still(run) ? 0 : run.meanRpm + noise(index)));
  const watts = column((run, index) => run.meanWatts + (still(run) ? 0 : noise(index)));
  return {
    bucketMs,
    t,
    rpm,
    rpmMin: rpm.map((value) => (value === null ? null : Math.max(0, value - 6))),
    rpmMax: rpm.map((value) => (value === null ? null : value + 6)),
    expectedRpm: column(({ expectedRpm }) => expectedRpm),
    watts,
    wattsMin: watts.map((value) => (value === null ? null : Math.max(0, value - 9))),
    wattsMax: watts.map((value) => (value === null ? null : value + 9)),
    closedInputs: column(({ closedInputs }) => closedInputs),
    coverage: seen.filter((run) => run !== undefined).length / Math.max(1, t.length),
  };
}
