import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createControl } from '#shared/domain/control/create-control.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { ClockWindow, PumpContext } from '#shared/domain/control/pump-context.ts';
import { createRunFold } from '#shared/domain/runs/create-run-fold.ts';
import { localDay } from '#shared/domain/time/local-days.ts';
import { inventedPump } from '../control/invented-pump.ts';
import { perfectReadings } from './invented-readings.ts';

const days = fc.array(fc.boolean(), { minLength: 7, maxLength: 7 });
const rpm = fc.integer({ min: 12, max: 69 }).map((fifties) => fifties * 50);
const programs = fc.array(
  fc.record({ days, fromMinute: fc.integer({ min: 0, max: 1439 }), toMinute: fc.integer({ min: 1, max: 1440 }), rpm }),
  { maxLength: 5 },
);
const windows: fc.Arbitrary<ClockWindow> = fc.record({
  days,
  onMinute: fc.integer({ min: 0, max: 1439 }),
  offMinute: fc.integer({ min: 0, max: 1440 }),
  opensEarlyMinutes: fc.integer({ min: 0, max: 30 }),
});
const inputWindows = fc.array(fc.record({ input: fc.integer({ min: 1, max: 3 }), window: windows }), { maxLength: 3 });
const prime = fc.option(fc.record({ rpm: fc.constant(3450), seconds: fc.integer({ min: 1, max: 1800 }) }));
const overlap = fc.constantFrom('first-listed' as const, 'higher-speed' as const);
/** Ordinary days, and the days of both shifts in both hemispheres. */
const places = fc.constantFrom(
  ['America/Phoenix', '2025-07-01'],
  ['America/New_York', '2025-03-09'],
  ['America/New_York', '2025-11-02'],
  ['Europe/Berlin', '2025-03-30'],
  ['Europe/Berlin', '2025-10-26'],
  ['Australia/Sydney', '2025-10-05'],
  ['Australia/Sydney', '2025-04-06'],
  ['Australia/Lord_Howe', '2025-04-06'],
  ['America/Santiago', '2025-09-07'],
) as fc.Arbitrary<[string, string]>;

/** What a day holds, as the plan has it and as the fold of a motor that follows the plan has it. */
function bothWays(context: PumpContext, date: string, offset: number | undefined, learnt: Parameters<typeof plan>[5]) {
  const bounds = localDay(context.zone, Date.parse(`${date}T00:00:00Z`) / 86_400_000);
  if (bounds === undefined) throw new Error(`no zone ${context.zone}`);
  const { from, to } = bounds;
  const where = { zone: context.zone, motorClockOffsetMinutes: offset ?? 0 };
  const planned = plan(context.settings, context.traits, where, from, to, learnt);
  const dayBefore = plan(context.settings, context.traits, where, from - 86_400_000, from, learnt);
  const control = createControl(context);
  const runs = createRunFold(context);
  // Whoever comes in while a motor runs has not seen its start; control is there since the day before.
  for (const reading of perfectReadings(dayBefore, context, offset)) control.push(reading);
  for (const reading of perfectReadings(planned, context, offset)) runs.push(reading, control.push(reading));
  runs.close(to);
  return { planned, folded: runs.take() };
}

describe('the plan of a day', () => {
  it('equals the fold of a perfect pump’s readings over it', () => {
    fc.assert(
      fc.property(
        fc.record({ program: programs, prime, inputs: fc.tuple(rpm, rpm, fc.option(rpm)), place: places, overlap }),
        inputWindows,
        // A minute off is what a clock that shows whole minutes can be off without anyone knowing.
        fc.option(
          fc.integer({ min: -120, max: 120 }).filter((minutes) => Math.abs(minutes) !== 1),
          { nil: undefined },
        ),
        ({ program, prime: primeSet, inputs, place: [zone, date], overlap: programOverlap }, learnt, offset) => {
          const settings = { program, prime: primeSet, inputs, freeze: null };
          const context = inventedPump({ zone, settings, traits: { programOverlap }, intervalSeconds: 60 });
          const { planned, folded } = bothWays(context, date, offset, learnt);
          expect(
            folded.map((run) => [run.from, run.to, run.source, run.expectedRpm, run.closedInputs, run.activeInput]),
          ).toEqual(planned.map((run) => [run.from, run.to, run.source, run.rpm, run.closedInputs, run.activeInput]));
          for (const run of folded) {
            expect(run.expectedSource).toBe(run.source);
            expect(run.flags).not.toContain('off-expected');
          }
        },
      ),
      { numRuns: 200 },
    );
  });
});
