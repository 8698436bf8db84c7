import type { Run } from '#shared/contract/http/runs.ts';

/**
 * Runs with one of them in its latest state, in order of time. A run is known by its beginning. A run that the new one
 * covers from within is one that late readings have corrected away; an open one before it has ended where it begins.
 */
export function upsertRun(runs: readonly Run[], run: Run): Run[] {
  const end = run.to ?? Number.POSITIVE_INFINITY;
  const kept = runs.filter(
    (other) => other.from !== run.from && !(other.from > run.from && other.from < end && covered(other, end)),
  );
  const before = kept.filter(({ from }) => from < run.from);
  const last = before.at(-1);
  if (last !== undefined && last.to === null) before[before.length - 1] = { ...last, to: run.from };
  return [...before, run, ...kept.filter(({ from }) => from > run.from)];
}

const covered = (other: Run, end: number) => (other.to ?? Number.POSITIVE_INFINITY) <= end;
