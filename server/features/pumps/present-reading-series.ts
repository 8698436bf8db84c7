import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import { DAY_MS } from './choose-bucket.ts';
import type { ReadingBucket } from './reading-read-model.ts';
import type { RunRow } from './run-read-model.ts';

type Window = {
  readonly from: number;
  readonly until: number;
  readonly bucketMs: number;
  readonly intervalMs: number;
  readonly now: number;
};

/** A gap longer than this many intervals shows as one, like a `no-data` run. */
const GAP_INTERVALS = 3;
/** A local day may last 25 hours: the next one begins so much later. */
const LONGEST_DAY_MS = DAY_MS + 3_600_000;

const emptySeries = (bucketMs: number): ReadingSeries => ({
  bucketMs,
  t: [],
  rpm: [],
  rpmMin: [],
  rpmMax: [],
  expectedRpm: [],
  watts: [],
  wattsMin: [],
  wattsMax: [],
  closedInputs: [],
  coverage: 0,
});

/** Lays readings out in columns, with a null where there is a gap and the expected speed of the run they lie in. */
export function presentReadingSeries(
  buckets: readonly ReadingBucket[],
  runs: readonly RunRow[],
  window: Window,
): ReadingSeries {
  const { bucketMs, intervalMs } = window;
  const series = emptySeries(bucketMs);
  const longestMs = bucketMs < DAY_MS ? bucketMs : bucketMs - DAY_MS + LONGEST_DAY_MS;
  const stepMs = Math.max(longestMs, intervalMs * GAP_INTERVALS);
  let previous: number | undefined;
  let runIndex = 0;
  for (const bucket of buckets) {
    if (previous !== undefined && bucket.at - previous > stepMs) addGap(series, previous + stepMs);
    previous = bucket.at;
    const middle = bucket.at + bucketMs / 2;
    while (runIndex + 1 < runs.length && (runs[runIndex + 1]?.from ?? 0) <= middle) runIndex += 1;
    addBucket(series, bucket, expectedAt(runs[runIndex], middle));
  }
  series.coverage = coverageOf(runs, window);
  return series;
}

function expectedAt(run: RunRow | undefined, at: number): number | null {
  const holds = run !== undefined && run.from <= at && (run.to === null || at < run.to);
  return holds && run.source !== 'no-data' ? run.expectedRpm : null;
}

function addBucket(series: ReadingSeries, bucket: ReadingBucket, expectedRpm: number | null): void {
  series.t.push(bucket.at);
  series.rpm.push(tenth(bucket.rpm));
  series.rpmMin.push(tenth(bucket.rpmMin));
  series.rpmMax.push(tenth(bucket.rpmMax));
  series.watts.push(tenth(bucket.watts));
  series.wattsMin.push(tenth(bucket.wattsMin));
  series.wattsMax.push(tenth(bucket.wattsMax));
  series.expectedRpm.push(expectedRpm);
  series.closedInputs.push(bucket.closedInputs);
}

function addGap(series: ReadingSeries, at: number): void {
  const { t, bucketMs: _bucketMs, coverage: _coverage, ...columns } = series;
  t.push(Math.round(at));
  for (const column of Object.values(columns)) column.push(null);
}

const tenth = (value: number) => Math.round(value * 10) / 10;

/** The part of the window up to now that readings cover: each run's own part of the time it shares with the window. */
function coverageOf(runs: readonly RunRow[], { from, until, now }: Window): number {
  const end = Math.min(until, now);
  if (end <= from) return 0;
  let covered = 0;
  for (const run of runs) {
    const to = run.to ?? end;
    const shared = Math.min(to, end) - Math.max(run.from, from);
    if (shared > 0 && to > run.from) covered += Math.min(shared, (run.coveredMs * shared) / (to - run.from));
  }
  return Math.min(1, Math.round((covered / (end - from)) * 10_000) / 10_000);
}
