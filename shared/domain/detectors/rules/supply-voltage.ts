import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** The last minutes' means with the minute in hand, and the nominal learnt over the first days. */
type State = {
  minutes: number[];
  minute: number;
  sum: number;
  count: number;
  mean: number;
  learntVolts: number;
  learntMs: number;
  firstAt: number;
  sagSince: number;
  lowest: number;
  off: boolean;
  sagging: boolean;
};
type Parameters = RuleParameters<'supply-voltage'>;

/** A voltage further off the nameplate than this teaches nothing. */
const TEACHABLE_SHARE = 0.12;
const LEAST_LEARNT_MS = 6 * 3_600_000;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { volts } = facts.reading;
  if (volts === undefined || !(volts > 0)) return UNJUDGED;
  addToMean(state, volts, facts, parameters);
  learnNominal(state, volts, facts, parameters);
  const nominal = nominalOf(state, facts, parameters);
  if (nominal === 0) return UNJUDGED;
  judgeSag(state, volts, nominal, facts, parameters);
  const allowed = parameters.offShare - (state.off ? parameters.deadbandShare : 0);
  state.off = state.minutes.length >= parameters.meanMinutes && Math.abs(state.mean / nominal - 1) > allowed;
  return state.off || state.sagging ? ABNORMAL : NORMAL;
}

/** The mean moves once a minute, which is often enough for ten of them. */
function addToMean(state: State, volts: number, { now, gap }: Facts, { meanMinutes }: Parameters): void {
  const minute = Math.floor(now / 60_000);
  if (gap) state.minutes = [];
  if (minute !== state.minute) {
    if (state.count > 0 && !gap) {
      state.minutes = state.minutes.slice(Math.max(0, state.minutes.length + 1 - meanMinutes));
      state.minutes.push(Math.round((state.sum / state.count) * 10) / 10);
      state.mean = state.minutes.reduce((sum, one) => sum + one, 0) / state.minutes.length;
    }
    state.minute = minute;
    state.sum = 0;
    state.count = 0;
  }
  state.sum += volts;
  state.count += 1;
}

function learnNominal(
  state: State,
  volts: number,
  { now, elapsedMs, gap, context }: Facts,
  parameters: Parameters,
): void {
  if (state.firstAt === 0) state.firstAt = now;
  if (gap || now - state.firstAt > parameters.learningDays * 86_400_000) return;
  const near = context.nominalVolts ?? volts;
  if (Math.abs(volts / near - 1) > TEACHABLE_SHARE) return;
  state.learntMs += elapsedMs;
  if (state.learntMs > 0) state.learntVolts += ((volts - state.learntVolts) * elapsedMs) / state.learntMs;
}

/** What was measured over the first three days; until then the nameplate; 0 where neither is known. */
function nominalOf(state: State, { now, context }: Facts, { learningDays }: Parameters): number {
  const learnt = now - state.firstAt >= learningDays * 86_400_000 && state.learntMs >= LEAST_LEARNT_MS;
  return learnt ? state.learntVolts : (context.nominalVolts ?? 0);
}

function judgeSag(state: State, volts: number, nominal: number, { now, gap }: Facts, parameters: Parameters): void {
  const limit = nominal * (parameters.sagShare + (state.sagging ? parameters.deadbandShare : 0));
  if (volts >= limit) {
    state.sagSince = 0;
    state.sagging = false;
    return;
  }
  if (state.sagSince === 0 || gap) {
    state.sagSince = now;
    state.lowest = volts;
  }
  state.lowest = Math.min(state.lowest, volts);
  state.sagging = now - state.sagSince >= parameters.sagSeconds * 1000;
}

function describe(state: State, facts: Facts, parameters: Parameters, { raised, onset }: Spoken): Finding {
  const nominal = nominalOf(state, facts, parameters);
  const shown = state.sagging && !state.off ? state.lowest : state.mean;
  return {
    cause: state.sagging && !state.off ? 'sag' : 'standing',
    ...(raised ? {} : { from: state.off ? facts.now - parameters.meanMinutes * 60_000 : state.sagSince || onset }),
    evidence: {
      volts: Math.round(shown * 10) / 10,
      nominalVolts: Math.round(nominal * 10) / 10,
      offShare: Math.round((shown / nominal - 1) * 1000) / 1000,
      lowestVolts: state.lowest === 0 ? null : state.lowest,
    },
  };
}

export const supplyVoltage = defineDetector<'supply-voltage', State>({
  detector: 'supply-voltage',
  hears: ['reading'],
  initial: () => ({
    minutes: [],
    minute: 0,
    sum: 0,
    count: 0,
    mean: 0,
    learntVolts: 0,
    learntMs: 0,
    firstAt: 0,
    sagSince: 0,
    lowest: 0,
    off: false,
    sagging: false,
  }),
  judge,
  delaySeconds: () => 0,
  describe,
});
