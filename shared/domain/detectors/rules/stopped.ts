import { isNearSuspectEdge } from '../clocks/motor-clock-tracker.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import { listEnergized } from '../energized-equipment.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

type State = Record<string, never>;

/** A speed is due and the shaft stands. What freeze protection alone asks for is judged by `freezing`. */
function judge(_: State, facts: Facts): Judgement {
  const { control, stands } = facts;
  if (!control.standing) return NORMAL;
  const { due } = control;
  if (due.rpm > 0 && due.source !== 'freeze') {
    // It stands because its program was changed: that is said already.
    if (stands('settings-changed') && facts.fitsReported()) return NORMAL;
    return control.winningInput === 0 && isNearSuspectEdge(facts) ? UNJUDGED : ABNORMAL;
  }
  // Where nothing is due a standing shaft says nothing: only one that turns ends the alarm.
  return stands('stopped') ? UNJUDGED : NORMAL;
}

function describe(_: State, facts: Facts, parameters: RuleParameters<'stopped'>, { onset }: Spoken): Finding {
  const { control, reading, now } = facts;
  const energized = listEnergized(facts);
  const ambient = reading.ambientCelsius;
  const frost = ambient !== undefined && ambient <= parameters.frostCelsius;
  const long = now - onset >= parameters.urgentAfterSeconds * 1000;
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
  initial: () => ({}),
  judge,
  delaySeconds: (_, { control }, parameters) =>
    control.decision.source === 'stop' ? parameters.keypadStopSeconds : parameters.delaySeconds,
  describe,
});
