import { fitsSpeed } from '#shared/domain/control/speed-tolerance.ts';
import { inputSpeed } from '#shared/domain/control/winning-input.ts';
import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { isNearSuspectEdge } from '../clocks/motor-clock-tracker.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/**
 * Minutes by which the last start on the program missed the nearest entry's beginning; null = none seen. `startedLate`:
 * that entry had begun while the shaft stood, since `stoodSince`, ms. `cause` = found while nothing was due.
 */
type State = {
  startMissedBy: number | null;
  startedLate: boolean;
  wasStanding: boolean;
  stoodSince: number;
  cause: string;
};

const SHORT_STAND_MS = 3_600_000;

function judge(state: State, facts: Facts, parameters: RuleParameters<'unexpected-run'>): Judgement {
  const { control, reading, stands } = facts;
  if (state.wasStanding && !control.standing && !facts.gap && reading.closedInputs === 0) noteStart(state, facts);
  if (control.standing && (!state.wasStanding || state.stoodSince === 0 || facts.gap)) state.stoodSince = facts.now;
  state.wasStanding = control.standing;
  if (control.standing) return NORMAL;
  const nothingExpected = facts.padState === 'winterized' || facts.padState === 'drained';
  if (!nothingExpected && control.due.rpm > 0) return stands('unexpected-run') ? UNJUDGED : NORMAL;
  if (obeysOpenInput(facts) || (stands('settings-changed') && facts.fitsReported())) return UNJUDGED;
  if (isNearSuspectEdge(facts)) return UNJUDGED;
  if (mayBeFreezeProtection(facts)) return stands('unexpected-run') ? UNJUDGED : NORMAL;
  // What other hours look like while it stands says nothing of this run.
  if (!stands('unexpected-run')) state.cause = causeOf(state, facts, parameters);
  return ABNORMAL;
}

/** It says that it obeys an input which is open, and runs that speed: a wrong speed, whatever else is due. */
export function obeysOpenInput({ reading, context }: Pick<Facts, 'reading' | 'context'>): boolean {
  const { activeInput, closedInputs, rpm } = reading;
  if (activeInput === 0 || (closedInputs & (1 << (activeInput - 1))) !== 0) return false;
  const speed = inputSpeed(context.settings.inputs, activeInput);
  return speed > 0 && fitsSpeed(rpm, speed);
}

/** Where neither the source nor the air's temperature is told, the speed of freeze protection may well be that. */
function mayBeFreezeProtection({ context, reading, reportsSource }: Facts): boolean {
  const { freeze } = context.settings;
  return (
    freeze !== null && !reportsSource && reading.ambientCelsius === undefined && fitsSpeed(reading.rpm, freeze.rpm)
  );
}

function noteStart(state: State, { context, localMinute, now, control }: Facts): void {
  // A pump that somebody stopped for a while says nothing of its clock when it goes on.
  if (now - state.stoodSince < SHORT_STAND_MS) return;
  let nearest: number | null = null;
  for (const entry of context.settings.program) {
    const missed = clockDifference(entry.fromMinute, localMinute);
    if (nearest === null || Math.abs(missed) < Math.abs(nearest)) nearest = missed;
  }
  state.startMissedBy = nearest;
  state.startedLate =
    nearest !== null && nearest > 0 && control.due.rpm > 0 && now - state.stoodSince > nearest * 60_000;
}

function describe(
  state: State,
  { reading, now, control }: Facts,
  _: RuleParameters<'unexpected-run'>,
  { onset }: Spoken,
): Finding {
  return {
    cause: state.cause,
    evidence: {
      measuredRpm: reading.rpm,
      watts: reading.watts,
      minutes: Math.round((now - onset) / 60_000),
      saysSource: reading.reportedSource ?? null,
      motorClockOffsetMinutes: control.motorClockKnown ? Math.round(control.motorClockOffsetMinutes) : null,
      startMissedByMinutes: state.startMissedBy === null ? null : Math.round(state.startMissedBy),
    },
  };
}

/**
 * A program run outside its hours has a changed program or a wrong clock behind it. A speed no entry has means the
 * program; with the clock known, so does any other; else the last start tells: late or early by the clock's error.
 */
function causeOf(
  state: State,
  { context, reading, control }: Facts,
  parameters: RuleParameters<'unexpected-run'>,
): string {
  const says = reading.reportedSource;
  const known = context.settings.program.some((entry) => fitsSpeed(reading.rpm, entry.rpm));
  // Without a word from the motor, a speed of the program at the wrong hour is all there is to go by.
  if (says !== 'program' && (says !== undefined || !known)) return 'unknown';
  if (!known) return 'program-changed';
  const missed = Math.abs(state.startMissedBy ?? 0) > parameters.sameClockMinutes;
  // A clock that was known and has jumped since: the program began late, and ends late.
  if (missed && state.startedLate && reading.motorClockMinute === undefined) return 'motor-clock';
  if (control.motorClockKnown) return says === 'program' ? 'program-changed' : 'unknown';
  if (state.startMissedBy === null) return 'unknown';
  if (missed) return 'motor-clock';
  return says === 'program' ? 'program-changed' : 'unknown';
}

export const unexpectedRun = defineDetector<'unexpected-run', State>({
  detector: 'unexpected-run',
  hears: ['reading'],
  initial: () => ({ startMissedBy: null, startedLate: false, wasStanding: false, stoodSince: 0, cause: 'unknown' }),
  judge,
  delaySeconds: (_, { reportsSource }, parameters) =>
    reportsSource ? parameters.delaySeconds : parameters.withoutSourceSeconds,
  describe,
});
