import type { Run } from '../runs/run.ts';

export type Gap = { readonly from: number; readonly to: number };

/** How much of a stretch the readings cover, 0 to 1, and every gap in it, in order. */
export type Coverage = { readonly coveredMs: number; readonly share: number; readonly gaps: readonly Gap[] };

/**
 * What part of the half-open stretch `from` to `to` (ms) runs cover; an open run lasts until `to`. `no-data` runs and
 * time without a run are gaps. Nothing is filled in for a gap: energy and water are of covered time alone. A stretch
 * of no length is not covered.
 *
 * @example coverageOf(runs, dayFrom, dayTo) // { coveredMs: 86_400_000, share: 1, gaps: [] }
 */
export function coverageOf(runs: readonly Pick<Run, 'from' | 'to' | 'source'>[], from: number, to: number): Coverage {
  if (!(from < to) || !Number.isFinite(to - from)) return { coveredMs: 0, share: 0, gaps: [] };
  const spans = runs
    .filter((run) => run.source !== 'no-data')
    .map((run) => ({ from: Math.max(run.from, from), to: Math.min(run.to ?? to, to) }))
    .filter((span) => span.from < span.to)
    .sort((left, right) => left.from - right.from);
  const gaps: Gap[] = [];
  let reached = from;
  for (const span of spans) {
    if (span.from > reached) gaps.push({ from: reached, to: span.from });
    reached = Math.max(reached, span.to);
  }
  if (reached < to) gaps.push({ from: reached, to });
  const coveredMs = gaps.reduce((left, gap) => left - (gap.to - gap.from), to - from);
  return { coveredMs, share: coveredMs / (to - from), gaps };
}
