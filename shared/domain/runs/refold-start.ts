import type { Run } from './run.ts';

/**
 * Where to begin folding again (ms) when a reading at `lateAt` came late: the last stored run before it that opened
 * because something else was expected, or after a gap. A run that opened because the speed left its mean depends on
 * the run before it, and a gap may be what the late reading fills. `stored` are the pump's runs in order, from some
 * hours before; without one before the reading it is the reading's own time.
 *
 * @example refoldRuns(context, readings, { from: refoldStart(stored, late.at), lateAt: [late.at] })
 */
export function refoldStart(stored: readonly Run[], lateAt: number): number {
  let start = lateAt;
  for (const [index, run] of stored.entries()) {
    if (run.from >= lateAt) break;
    const before = stored[index - 1];
    if (run.source === 'no-data') continue;
    if (before === undefined || before.source === 'no-data' || expectsElse(before, run)) start = run.from;
  }
  return start;
}

function expectsElse(before: Run, run: Run): boolean {
  if (before.closedInputs !== run.closedInputs || before.expectedSource !== run.expectedSource) return true;
  // On manual the expected speed is the measured one: a new one may be a mere departure.
  return run.expectedSource !== 'keypad' && before.expectedRpm !== run.expectedRpm;
}
