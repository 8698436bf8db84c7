import fc from 'fast-check';
import type { PlannedRun } from '#shared/domain/control/plan.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { type Reading, SOURCES } from '#shared/domain/readings/reading.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { localTime } from '#shared/domain/time/local-time.ts';

/**
 * The readings of a motor that does exactly what was planned: at every change, and every interval in between. It
 * shows its own clock where `motorClockOffset` (minutes ahead of the wall) is given.
 */
export function perfectReadings(
  runs: readonly PlannedRun[],
  { zone, intervalSeconds }: PumpContext,
  motorClockOffset: number | undefined,
): Reading[] {
  const readings: Reading[] = [];
  for (const { from, to, rpm, closedInputs, activeInput } of runs) {
    for (let at = from; at < to; at += intervalSeconds * 1000) {
      const shown = Math.floor((localTime(zone, at)?.minute ?? 0) + (motorClockOffset ?? 0) + 1440) % 1440;
      const motorClockMinute = motorClockOffset === undefined ? undefined : shown;
      readings.push({ at, rpm, closedInputs, activeInput, watts: 5 + rpm / 8, motorClockMinute });
    }
  }
  return readings;
}

const steps = fc.record({
  // Some at once after another, most at the interval, some after a gap.
  seconds: fc.oneof(
    { weight: 6, arbitrary: fc.constantFrom(10, 10, 10, 1, 25) },
    { weight: 1, arbitrary: fc.integer({ min: 1, max: 4000 }) },
  ),
  rpm: fc.oneof(fc.constantFrom(0, 0, 1150, 1700, 2400, 2850, 3200, 3450), fc.integer({ min: 0, max: 3450 })),
  noise: fc.integer({ min: -15, max: 15 }),
  repeat: fc.integer({ min: 1, max: 12 }),
  closedInputs: fc.constantFrom(0, 0, 0, 1, 2, 3, 4),
  watts: fc.integer({ min: 0, max: 2000 }),
  reportedSource: fc.option(fc.constantFrom(...SOURCES), { nil: undefined, freq: 2 }),
  ambientCelsius: fc.option(fc.integer({ min: -5, max: 30 }), { nil: undefined }),
});

/** Readings of a motor that does anything at all, in stretches that last a while. */
export function anyReadings(from: number): fc.Arbitrary<Reading[]> {
  return fc.array(steps, { minLength: 1, maxLength: 60 }).map((stretches) => {
    let at = from;
    return stretches.flatMap(({ seconds, rpm, noise, repeat, ...rest }) =>
      Array.from({ length: repeat }, (_, index): Reading => {
        at += seconds * 1000;
        return { at, rpm: Math.max(0, rpm + (index % 2) * noise), activeInput: 0, ...rest };
      }),
    );
  });
}

/** The last state of every run given out, in order: what a table keyed by `from` would hold. */
export function lastStates(taken: readonly Run[]): Run[] {
  const byFrom = new Map<number, Run>();
  for (const run of taken) byFrom.set(run.from, run);
  return [...byFrom.values()].sort((left, right) => left.from - right.from);
}
