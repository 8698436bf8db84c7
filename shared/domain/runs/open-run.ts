import type { ControlAnswer } from '../control/control-answer.ts';
import type { Reading } from '../readings/reading.ts';
import type { Departure, OpenRun } from './run-fold-state.ts';
import { emptySums } from './run-sums.ts';

/** A run that opens with a reading, as control sees it then. */
export function openRun(from: number, reading: Reading, { decision, due, winningInput }: ControlAnswer): OpenRun {
  return {
    ...emptySums(),
    from,
    decisionSource: decision.source,
    decisionRpm: decision.rpm,
    dueSource: due.source,
    dueRpm: due.rpm,
    closedInputs: reading.closedInputs,
    activeInput: winningInput,
    reported: reading.reportedSource ?? null,
    settled: false,
    firstRpm: reading.rpm,
    firstWatts: reading.watts,
    flags: [],
  };
}

/** The departure that lasted: the same answer of control, another speed. */
export function partedRun(departure: Departure, before: OpenRun, reading: Reading): OpenRun {
  const { since, firstWatts, holdWattMs: _, ...sums } = departure;
  return { ...before, ...sums, from: since, settled: true, firstRpm: reading.rpm, firstWatts, flags: [] };
}

/** Whether a reading belongs to another run: another source, mask or expected speed. */
export function isAnotherRun(open: OpenRun, reading: Reading, { decision, due }: ControlAnswer): boolean {
  return (
    reading.closedInputs !== open.closedInputs ||
    decision.source !== open.decisionSource ||
    due.source !== open.dueSource ||
    (due.rpm !== open.dueRpm && due.source !== 'keypad')
  );
}
