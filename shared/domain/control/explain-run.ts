import type { Run } from '../runs/run.ts';
import { decide } from './decide.ts';
import type { Because, Decision } from './decision.ts';
import type { Explained } from './explain.ts';
import type { ExplainContext } from './explain-options.ts';
import { listClosedInputs } from './winning-input.ts';

/**
 * A stored run at an instant within it (ms) as something to explain: the line under the cursor. `motorClockOffset`
 * is how far the motor's clock was ahead, minutes.
 *
 * @example explain(explainedRun(run, at, context, 0), context, options)
 */
export function explainedRun(
  run: Run,
  at: number,
  context: ExplainContext,
  motorClockOffsetMinutes: number,
): Explained {
  const { settings, traits, zone } = context;
  const { closedInputs, expectedSource } = run;
  const decision = decide(settings, traits, { at, zone, motorClockOffsetMinutes, closedInputs });
  const locked = expectedSource === 'input' && traits.precedence.indexOf('input') < traits.precedence.indexOf('keypad');
  return {
    at,
    rpm: run.meanRpm,
    source: run.source,
    expectedSource,
    expectedRpm: run.expectedRpm,
    because: becauseOf(run, decision, context),
    until: untilOf(run, decision),
    lockedBy: locked ? run.activeInput : undefined,
  };
}

function becauseOf(run: Run, decision: Decision, { settings }: ExplainContext): Because {
  if (run.source === 'stop' || run.source === 'fault')
    return run.source === 'stop' ? { kind: 'stop' } : { kind: 'fault', code: undefined };
  switch (run.expectedSource) {
    case 'input': {
      const others = listClosedInputs(run.closedInputs).filter((input) => input !== run.activeInput);
      return { kind: 'input', input: run.activeInput, others };
    }
    case 'program':
      return decision.because.kind === 'program' ? decision.because : entryAt(run.expectedRpm, settings);
    case 'prime':
      return { kind: 'prime', endsAt: run.from + (settings.prime?.seconds ?? 0) * 1000, next: decision.source };
    case 'timed':
      return { kind: 'timed', endsAt: run.from + (settings.timed?.minutes ?? 0) * 60_000 };
    case 'fault':
      return { kind: 'fault', code: undefined };
    default:
      return { kind: run.expectedSource };
  }
}

/** The entry of that speed, where the clock no longer says which: the program may have been changed since. */
function entryAt(rpm: number, { program }: ExplainContext['settings']): Because {
  const index = program.findIndex((entry) => entry.rpm === rpm);
  const entry = program[index];
  if (entry === undefined) return { kind: 'unknown' };
  return { kind: 'program', entry: index, fromMinute: entry.fromMinute, toMinute: entry.toMinute };
}

function untilOf(run: Run, decision: Decision): number | undefined {
  if (run.to !== undefined && run.expectedSource !== 'input') return run.to;
  return run.expectedSource === decision.source ? decision.until : undefined;
}
