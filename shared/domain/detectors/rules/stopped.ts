import { findSlotIndex, programTimeline } from '#shared/domain/control/program-timeline.ts';
import { isNearSuspectEdge } from '../clocks/motor-clock-tracker.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import { listEnergized } from '../energized-equipment.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/**
 * How long it stood while a speed was due, and when that was last so: nights in which nothing is due count for nothing.
 * `since` = the first of those readings, and until how much later somebody's keypad stop lasted, ms.
 */
type State = { stoodMs: number; stoodAt: number; since: number; keptBackMs: number };

/** Readings further apart than this do not tell what was in between. */
const SEEN_WITHIN_MS = 600_000;

/** A speed is due and the shaft stands. What freeze protection alone asks for is judged by `freezing`. */
function judge(state: State, facts: Facts): Judgement {
  const { control, stands, now } = facts;
  if (!control.standing) {
    state.stoodMs = 0;
    state.stoodAt = 0;
    state.since = 0;
    state.keptBackMs = 0;
    return NORMAL;
  }
  const { due } = control;
  if (due.rpm > 0 && due.source !== 'freeze') {
    // It stands because its program was changed: that is said already.
    if (stands('settings-changed') && facts.fitsReported()) return NORMAL;
    if (control.winningInput === 0 && (isNearSuspectEdge(facts) || hasClockBeenSet(facts))) return UNJUDGED;
    if (state.stoodAt !== 0 && now - state.stoodAt <= SEEN_WITHIN_MS) state.stoodMs += now - state.stoodAt;
    state.stoodAt = now;
    if (state.since === 0) state.since = now;
    if (control.decision.source === 'stop') state.keptBackMs = now - state.since;
    return ABNORMAL;
  }
  if (!stands('stopped')) {
    state.since = 0;
    state.keptBackMs = 0;
  }
  // Where nothing is due a standing shaft says nothing: only one that turns ends the alarm.
  return stands('stopped') ? UNJUDGED : NORMAL;
}

/** The motor's clock is said to be off, and by the right time nothing is due: somebody has set it. */
function hasClockBeenSet({ stands, control, context, now }: Facts): boolean {
  if (!stands('motor-clock') || control.due.source !== 'program') return false;
  const { program } = context.settings;
  const timeline = programTimeline(program, context.traits.programOverlap, context.zone, 0, now);
  return (timeline.slots[findSlotIndex(timeline, now)]?.rpm ?? 0) <= 0;
}

function describe(state: State, facts: Facts, parameters: RuleParameters<'stopped'>, { onset }: Spoken): Finding {
  const { control, reading, now } = facts;
  const energized = listEnergized(facts);
  const ambient = reading.ambientCelsius;
  const frost = ambient !== undefined && ambient <= parameters.frostCelsius;
  const long = state.stoodMs >= parameters.urgentAfterSeconds * 1000;
  return {
    cause: causeOf(facts),
    priority: frost || long || energized.length > 0 ? 'urgent' : 'soon',
    evidence: {
      expectedRpm: control.due.rpm,
      expectedSource: control.due.source,
      minutes: Math.round((now - onset) / 60_000),
      watts: reading.watts,
      ambientCelsius: ambient ?? null,
      fault: reading.fault ?? null,
      energized,
    },
  };
}

function causeOf({ control, reading }: Facts): string {
  if (control.decision.source === 'stop') return 'keypad-stop';
  return reading.reportedSource === 'fault' || reading.fault !== undefined ? 'fault' : 'unknown';
}

export const stopped = defineDetector<'stopped', State>({
  detector: 'stopped',
  hears: ['reading'],
  initial: () => ({ stoodMs: 0, stoodAt: 0, since: 0, keptBackMs: 0 }),
  judge,
  // A keypad stop that has ended is nobody's fault: the other causes have their time from then on.
  delaySeconds: ({ keptBackMs }, { control }, parameters) =>
    control.decision.source === 'stop'
      ? parameters.keypadStopSeconds
      : parameters.delaySeconds + Math.round(keptBackMs / 1000),
  describe,
});
