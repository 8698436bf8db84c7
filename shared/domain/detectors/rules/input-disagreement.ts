import { fitsSpeed } from '#shared/domain/control/speed-tolerance.ts';
import { inputSpeed, isWinningInput, listClosedInputs } from '#shared/domain/control/winning-input.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** The closed inputs of the disagreement that was last seen, and what the motor obeyed. */
type State = { closed: number; active: number };

/**
 * The motor says that it obeys an input which cannot have won. What the motor merely ignores, a lower input that it
 * follows, and an open one that it runs alone are wrong speeds, each with a cause of its own.
 */
function judge(state: State, facts: Facts): Judgement {
  const { reading, control, inputs, context, stands } = facts;
  const { activeInput, rpm } = reading;
  const closed = reading.closedInputs & inputs.wired;
  if (control.standing || !control.rampOver || isPriming(facts)) return UNJUDGED;
  if (activeInput === 0) return stands('input-disagreement') ? UNJUDGED : NORMAL;
  if (isWinningInput(context.settings.inputs, closed, activeInput)) {
    return stands('input-disagreement') && closed !== state.closed ? UNJUDGED : NORMAL;
  }
  const follows = fitsSpeed(rpm, inputSpeed(context.settings.inputs, activeInput));
  const obeysLower = (closed & (1 << (activeInput - 1))) !== 0;
  if (follows && (obeysLower || closed === 0)) return UNJUDGED;
  state.closed = closed;
  state.active = activeInput;
  return ABNORMAL;
}

function isPriming({ control, reading }: Facts): boolean {
  return control.due.source === 'prime' || reading.reportedSource === 'prime';
}

function describe(state: State, { reading, control, context }: Facts): Finding {
  const follows = fitsSpeed(reading.rpm, inputSpeed(context.settings.inputs, state.active));
  const swapped = control.winningInput !== 0 && follows;
  return {
    cause: swapped ? 'swapped-leads' : 'unknown',
    evidence: {
      input: control.winningInput === 0 ? null : control.winningInput,
      activeInput: state.active,
      closedInputs: listClosedInputs(state.closed),
      measuredRpm: reading.rpm,
      expectedRpm: control.due.rpm,
    },
  };
}

export const inputDisagreement = defineDetector<'input-disagreement', State>({
  detector: 'input-disagreement',
  hears: ['reading'],
  initial: () => ({ closed: 0, active: 0 }),
  judge,
  describe,
});
