import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

type State = { cold: boolean };
type Parameters = RuleParameters<'freezing'>;

/** Freeze protection's own limit, or the usual one where it is switched off (10 CFR 431.485(d): 4.4 °C). */
function guardCelsius({ context }: Facts, { unprotectedCelsius }: Parameters): number {
  return context.settings.freeze?.celsius ?? unprotectedCelsius;
}

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { reading, control } = facts;
  const { ambientCelsius } = reading;
  if (ambientCelsius === undefined) return UNJUDGED;
  if (!control.standing) {
    state.cold = false;
    return NORMAL;
  }
  const guard = guardCelsius(facts, parameters);
  // The deadband holds an alarm: readings that wander about the limit hold no wait for one.
  state.cold = ambientCelsius <= guard + (facts.stands('freezing') ? parameters.deadbandCelsius : 0);
  return state.cold ? ABNORMAL : NORMAL;
}

/**
 * Half an hour from the first reading at the guard; but with protection set not before the air is clearly below it,
 * because the motor's own sensor decides when that starts, and looks again only once an hour.
 */
function delaySeconds(_: State, facts: Facts, parameters: Parameters): number {
  const ambient = facts.reading.ambientCelsius ?? Number.POSITIVE_INFINITY;
  const tolerance = facts.context.settings.freeze === null ? 0 : parameters.sensorToleranceCelsius;
  const clearly = ambient <= guardCelsius(facts, parameters) - tolerance;
  return clearly ? parameters.delaySeconds : Number.POSITIVE_INFINITY;
}

function describe(_: State, facts: Facts, parameters: Parameters, { onset }: Spoken): Finding {
  const { reading, context, now } = facts;
  const ambient = reading.ambientCelsius ?? Number.NaN;
  const urgent = ambient <= parameters.urgentCelsius;
  const set = context.settings.freeze !== null;
  return {
    cause: 'unknown',
    priority: urgent ? 'urgent' : set ? 'soon' : 'note',
    alarmClass: urgent || set ? 'alarm' : 'note',
    evidence: {
      ambientCelsius: ambient,
      guardCelsius: guardCelsius(facts, parameters),
      protectionSet: set,
      minutes: Math.round((now - onset) / 60_000),
      saysSource: reading.reportedSource ?? null,
    },
  };
}

export const freezing = defineDetector<'freezing', State>({
  detector: 'freezing',
  hears: ['reading'],
  initial: () => ({ cold: false }),
  judge,
  delaySeconds,
  describe,
});
