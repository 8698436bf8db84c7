import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** `cause` = found while the load was gone: water that comes back is ragged too. */
type State = { ragged: boolean; dry: boolean; cause: string };
type Parameters = RuleParameters<'loss-of-prime'>;

/** Ragged watts are air only where they are also lower than usual. */
const RAGGED_BELOW = 0.92;
/** A wet end that has lost its water draws steadily, at about a third; above this, ragged watts are gulps of air. */
const GULPS_ABOVE = 0.41;

/**
 * A pump that had load in this run and holds its speed without it, or gulps air. Below 1500 rpm the watts say too
 * little about the load to judge.
 */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { load, control, context } = facts;
  if (!load.running || load.basis === 'none' || control.rpm < parameters.slowRpm || !control.rampOver) return UNJUDGED;
  // A model alone cannot tell a lost prime from a pump that differs from it; it may judge the prime, seen from zero.
  if (!load.primedOnce || (control.offExpected && !facts.stands('loss-of-prime'))) return UNJUDGED;
  // By the reading itself, so that neither the loss nor the return waits for smoothed watts.
  state.dry = facts.stands('loss-of-prime') ? load.primed === false : load.dry;
  const usual = Math.max(parameters.raggedShare, parameters.raggedTimesUsual * load.usualRaggedness);
  state.ragged = load.basis === 'band' && !hasRaggedDuty(facts) && load.ratio < RAGGED_BELOW && load.raggedness > usual;
  state.cause = causeOf(state, facts, usual);
  if (context.padState === 'drained') return UNJUDGED;
  return state.dry || state.ragged ? ABNORMAL : NORMAL;
}

function causeOf(state: State, { load, stands }: Facts, usualRaggedness: number): string {
  if (state.dry) return load.raggedness > usualRaggedness && load.ratio > GULPS_ABOVE ? 'ragged' : 'sudden';
  return state.ragged && !stands('loss-of-prime') ? 'ragged' : state.cause;
}

/** Spa jets and features draw air and turn valves by design. */
function hasRaggedDuty({ context, reading }: Facts): boolean {
  return context.inputs.some(
    ({ number, drives }) =>
      (drives === 'spa' || drives === 'feature') && (reading.closedInputs & (1 << (number - 1))) !== 0,
  );
}

function describe(state: State, facts: Facts, _: Parameters, { onset }: Spoken): Finding {
  const { load, reading, now } = facts;
  return {
    cause: state.cause,
    evidence: {
      rpm: Math.round(reading.rpm),
      watts: Math.round(load.watts),
      primedWatts: Math.round(load.primedWatts),
      loadShare: Math.round(load.ratio * 100) / 100,
      raggedShare: Math.round(load.raggedness * 100) / 100,
      knownFrom: load.basis,
      minutes: Math.round((now - onset) / 60_000),
    },
  };
}

const isSlow = ({ control }: Facts, { fastRpm }: Parameters): boolean => control.rpm < fastRpm;

export const lossOfPrime = defineDetector<'loss-of-prime', State>({
  detector: 'loss-of-prime',
  hears: ['reading'],
  initial: () => ({ ragged: false, dry: false, cause: 'sudden' }),
  judge,
  delaySeconds: (_, facts, parameters) =>
    isSlow(facts, parameters) ? parameters.slowDelaySeconds : parameters.delaySeconds,
  offDelaySeconds: (_, facts, parameters) =>
    isSlow(facts, parameters) ? parameters.slowOffDelaySeconds : parameters.offDelaySeconds,
  describe,
});
