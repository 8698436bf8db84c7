import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** Messages in a row that were behind, or in time, and the last one's device time and arrival. */
type State = { behind: number; inTime: number; at: number; receivedAt: number; since: number };
type Parameters = RuleParameters<'clock-skew'>;

/**
 * Single readings that arrive well after their own time, three in a row since the device last came online. What was
 * kept for want of a link is late too, but comes in faster than it was measured: that says nothing of the clock.
 */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  if (facts.kind === 'status') {
    forget(state);
    return UNJUDGED;
  }
  if (!facts.single) return UNJUDGED;
  const { now, receivedAt } = facts;
  const catchesUp = state.at !== 0 && receivedAt - state.receivedAt < (now - state.at) / 2;
  state.at = now;
  state.receivedAt = receivedAt;
  const behindMs = receivedAt - now;
  const limitMs = (parameters.behindSeconds - (state.behind > 0 ? parameters.deadbandSeconds : 0)) * 1000;
  if (behindMs > limitMs) count(state, catchesUp, receivedAt);
  else {
    state.behind = 0;
    state.inTime += 1;
  }
  if (state.behind >= parameters.messages) return ABNORMAL;
  return state.inTime >= parameters.messages ? NORMAL : UNJUDGED;
}

function count(state: State, catchesUp: boolean, receivedAt: number): void {
  state.inTime = 0;
  state.behind = catchesUp ? 0 : state.behind + 1;
  if (state.behind === 1) state.since = receivedAt;
}

function forget(state: State): void {
  state.behind = 0;
  state.inTime = 0;
  state.at = 0;
}

function describe({ since }: State, { now, receivedAt }: Facts): Finding {
  const skewMinutes = Math.round((receivedAt - now) / 6000) / 10;
  return { cause: 'unknown', from: since, evidence: { skewMinutes } };
}

export const clockSkew = defineDetector<'clock-skew', State>({
  detector: 'clock-skew',
  hears: ['reading', 'status'],
  clock: 'arrival',
  initial: () => ({ behind: 0, inTime: 0, at: 0, receivedAt: 0, since: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
