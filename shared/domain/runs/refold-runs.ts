import { createControl } from '../control/create-control.ts';
import type { PumpContext } from '../control/pump-context.ts';
import { isSoundReading } from '../readings/check-reading.ts';
import type { Reading } from '../readings/reading.ts';
import { createRunFold } from './create-run-fold.ts';
import { flowOfRuns } from './flow-of-runs.ts';
import type { Run } from './run.ts';

/**
 * What to fold again. `from` is what `refoldStart` answers, `to` the `from` of a stored run that stays, ms; without it
 * the last run stays open.
 */
export type Stretch = {
  readonly from: number;
  readonly to?: number | undefined;
  /** Control as saved at or before the first reading given; without it readings before `from` warm it up. */
  readonly controlStart?: unknown;
  /** Device times of the readings that came late. */
  readonly lateAt: readonly number[];
  /** The stored runs about the stretch: their flow is what the corrected ones are told. */
  readonly stored?: readonly Run[] | undefined;
};

/**
 * The runs of a stretch worked out again from all its readings, late ones among them, sorted by time; they replace
 * the stored runs from `from` up to `to`. Give some hours of readings before `from` where no saved control exists:
 * they only teach control. Runs that hold a late reading are marked `late-corrected`. Empty without readings.
 *
 * @example refoldRuns(context, readings, { from: run.from, to: nextRun.from, lateAt: [late.at] })
 */
export function refoldRuns(context: PumpContext, readings: readonly Reading[], stretch: Stretch): Run[] {
  const { from, to = Number.POSITIVE_INFINITY } = stretch;
  const control = createControl(context, stretch.controlStart);
  const fold = createRunFold(context);
  const flowAt = flowOfRuns(stretch.stored ?? []);
  for (const reading of readings) {
    if (reading.at >= to) break;
    if (!isSoundReading(reading, context.traits)) continue;
    const answer = control.push(reading);
    if (reading.at >= from) fold.push(reading, answer, flowAt(reading.rpm));
  }
  if (Number.isFinite(to)) fold.close(to);
  return fold
    .take()
    .map((run) => (holdsAny(run, stretch.lateAt) ? { ...run, flags: [...run.flags, 'late-corrected'] } : run));
}

function holdsAny({ from, to = Number.POSITIVE_INFINITY }: Run, instants: readonly number[]): boolean {
  return instants.some((instant) => instant >= from && instant < to);
}
