import { refoldStart } from '#shared/domain/runs/refold-start.ts';
import type { Run } from '#shared/domain/runs/run.ts';

/** What has to be folded again: from the beginning of a run to the beginning of one that stays, ms. */
export type TouchedStretch = {
  readonly from: number;
  readonly to: number;
  /** The run at its end opened because something else was due: folding again cannot move it. */
  readonly isFirm: boolean;
};

/**
 * The stretch of stored runs that late readings touch; undefined while that is the open run alone, which is folded on
 * and cannot be replaced yet.
 */
export function findTouchedStretch(stored: readonly Run[], lateAt: readonly number[]): TouchedStretch | undefined {
  const first = Math.min(...lateAt);
  const last = Math.max(...lateAt);
  const firmEnd = stored.find((run, index) => run.from > last && opensFirmly(stored, index));
  const end = firmEnd ?? stored.findLast((run) => run.to === undefined);
  const from = refoldStart(stored, first);
  return end === undefined || end.from <= from ? undefined : { from, to: end.from, isFirm: firmEnd !== undefined };
}

/** A gap before a run may be what the late readings fill. */
function opensFirmly(stored: readonly Run[], index: number): boolean {
  const run = stored[index];
  const before = stored[index - 1];
  if (run === undefined || before === undefined || before.source === 'no-data' || run.source === 'no-data')
    return false;
  return refoldStart([before, run], run.from + 1) === run.from;
}
