import { isNearProgramEdge } from '#shared/domain/control/is-near-program-edge.ts';
import { fitsSpeed, speedTolerance } from '#shared/domain/control/speed-tolerance.ts';
import { inputSpeed, listClosedInputs } from '#shared/domain/control/winning-input.ts';
import { isNearSuspectEdge } from '../clocks/motor-clock-tracker.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { obeysOpenInput } from './unexpected-run.ts';
import { followedInput, wrongSpeedCause } from './wrong-speed-cause.ts';

/**
 * Off the expected speed, and in which situation: only the same situation can show that it is cured. `byRpm` = how far
 * off it is in the mean of two minutes, from the speed that was `due`. `metAt` = when the situation last came, ms.
 */
type State = { off: boolean; situation: number; cause: string; due: number; byRpm: number; metAt: number };

/** A situation that has not come again for so long will not show a cure: somebody has taken the input out of use, ms. */
const FORGOTTEN_MS = 3 * 86_400_000;
/** One reading is noisy by some rpm: near the limit the mean is judged, ms. */
const MEAN_MS = 120_000;

const OF_PROGRAM = 50;
const OF_OTHERS = 51;
const OF_OPEN_INPUT = 100;

function judge(state: State, facts: Facts, parameters: RuleParameters<'wrong-speed'>): Judgement {
  const { control } = facts;
  if (!control.rampOver || control.due.source === 'prime' || isNearUnknownEdge(facts, parameters)) return UNJUDGED;
  const open = obeysOpenInput(facts) && control.winningInput === 0;
  // Standing where a speed is due is `stopped`; running where none is due is `unexpected-run`.
  const others = control.standing !== control.due.rpm <= 0 && !open;
  const allowed = speedTolerance(control.due.rpm) * (facts.stands('wrong-speed') ? 1 - parameters.deadbandShare : 1);
  const off = Math.abs(meanOff(state, facts)) > allowed && !others;
  if (!off || (facts.stands('settings-changed') && facts.fitsReported())) {
    state.off = false;
    const isOther = others || !isSameSituation(state, facts);
    const stands = facts.stands('wrong-speed');
    if (!stands) state.metAt = 0;
    else if (!isOther) state.metAt = facts.now;
    return stands && isOther && facts.now - state.metAt < FORGOTTEN_MS ? UNJUDGED : NORMAL;
  }
  state.metAt = facts.now;
  state.off = true;
  if (!facts.stands('wrong-speed'))
    state.situation = open ? OF_OPEN_INPUT + facts.reading.activeInput : situationOf(facts);
  return ABNORMAL;
}

function meanOff(state: State, { control, elapsedMs }: Facts): number {
  const by = control.rpm - control.due.rpm;
  const isOther = state.due !== control.due.rpm || Math.abs(by - state.byRpm) > speedTolerance(control.due.rpm);
  state.due = control.due.rpm;
  const mean = isOther ? by : state.byRpm + (elapsedMs / (elapsedMs + MEAN_MS)) * (by - state.byRpm);
  state.byRpm = Math.round(mean * 100) / 100;
  return state.byRpm;
}

function situationOf({ control }: Facts): number {
  if (control.winningInput !== 0) return control.winningInput;
  return control.due.source === 'program' ? OF_PROGRAM : OF_OTHERS;
}

/** An alarm about an open input is tested whenever that input is open. */
function isSameSituation({ situation }: State, facts: Facts): boolean {
  if (situation > OF_OPEN_INPUT) return (facts.reading.closedInputs & (1 << (situation - OF_OPEN_INPUT - 1))) === 0;
  return situation === situationOf(facts);
}

/**
 * Around a program edge either speed is right until the motor's clock is known; and a speed of the program is right
 * there as well where only its edges tell of that clock, which may have moved since by less than anybody looks for.
 */
function isNearUnknownEdge(facts: Facts, { programEdgeMinutes }: RuleParameters<'wrong-speed'>): boolean {
  const { control, context, motorClock } = facts;
  if (control.winningInput !== 0) return false;
  if (isNearSuspectEdge(facts)) return true;
  if (!isNearProgramEdge(control, programEdgeMinutes)) return false;
  if (!control.motorClockKnown) return true;
  return motorClock.basis !== 'says' && context.settings.program.some(({ rpm }) => fitsSpeed(control.rpm, rpm));
}

/** A pump that never says what commands it may be on manual or on a timed run while its inputs are open. */
function delaySeconds(_: State, facts: Facts, parameters: RuleParameters<'wrong-speed'>): number {
  const hidden = !facts.reportsSource && facts.control.winningInput === 0 && facts.reading.activeInput === 0;
  return hidden ? parameters.withoutSourceSeconds : parameters.delaySeconds;
}

/** A motor that ignores an input follows another one while that is closed too: the first explains both. */
function betterCause(known: string, found: string): string {
  return known === 'unknown-speed' || (known === 'follows-lower-input' && found === 'ignores-input') ? found : known;
}

function describe(state: State, facts: Facts, parameters: RuleParameters<'wrong-speed'>, { raised }: Spoken): Finding {
  const { reading, control, context } = facts;
  // What another situation looks like says nothing of this alarm's.
  if (!raised) state.cause = wrongSpeedCause(facts, parameters);
  else if (isSameSituation(state, facts)) state.cause = betterCause(state.cause, wrongSpeedCause(facts, parameters));
  const followed = followedInput(facts);
  return {
    cause: state.cause,
    evidence: {
      measuredRpm: reading.rpm,
      expectedRpm: control.due.rpm,
      expectedSource: control.due.source,
      input: control.winningInput === 0 ? null : control.winningInput,
      followedInput: followed === 0 ? null : followed,
      followedRpm: followed === 0 ? null : inputSpeed(context.settings.inputs, followed),
      activeInput: reading.activeInput,
      closedInputs: listClosedInputs(reading.closedInputs),
      watts: reading.watts,
      volts: reading.volts ?? null,
      driveCelsius: reading.driveCelsius ?? null,
    },
  };
}

export const wrongSpeed = defineDetector<'wrong-speed', State>({
  detector: 'wrong-speed',
  hears: ['reading'],
  initial: () => ({ off: false, situation: 0, cause: 'unknown-speed', due: 0, byRpm: 0, metAt: 0 }),
  judge,
  delaySeconds,
  describe,
});
