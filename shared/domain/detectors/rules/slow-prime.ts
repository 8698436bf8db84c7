import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** Seconds to prime: what was usual (oldest first), and the last starts; `counted` is the start that was taken last. */
type State = {
  usual: number[];
  recent: number[];
  recentAt: number[];
  stood: number[];
  counted: number;
  slow: boolean;
  changes: number;
};
type Parameters = RuleParameters<'slow-prime'>;

const KEPT = 20;
const SHORT_STAND_SECONDS = 3600;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { load } = facts;
  // Load that came is judged once it has lasted a minute, so that a gulp is not taken for a prime.
  const primedMs = facts.now - load.startedAt - load.primeSeconds * 1000;
  const fresh = load.primedOnce && load.startSeen && load.startedAt !== state.counted && primedMs >= 60_000;
  if (!fresh) return UNJUDGED;
  state.counted = load.startedAt;
  state.changes += 1;
  const leastSeconds = facts.context.intervalSeconds;
  // What lies between two readings is nobody's prime: only the time seen without load counts.
  takeStart(state, Math.max(load.dryForSeconds, leastSeconds), facts, parameters);
  return state.slow ? ABNORMAL : state.usual.length < parameters.teachingStarts ? UNJUDGED : NORMAL;
}

function takeStart(state: State, seconds: number, { load, context }: Facts, parameters: Parameters): void {
  const usual = medianOf(state.usual);
  state.recent = [...state.recent, Math.round(seconds)].slice(-parameters.ofStarts);
  state.recentAt = [...state.recentAt, load.startedAt].slice(-parameters.ofStarts);
  state.stood = [...state.stood, Math.round(load.stoodSeconds)].slice(-parameters.ofStarts);
  const taught = state.usual.length >= parameters.teachingStarts;
  // Load is seen an interval late at the most: two intervals more are more for certain.
  const excess = Math.max(parameters.leastExcessSeconds, 1.5 * context.intervalSeconds);
  const isSlow = (one: number): boolean => one >= parameters.timesUsual * usual && one - usual >= excess;
  if (!taught || !isSlow(seconds)) state.usual = [...state.usual, Math.round(seconds)].slice(-KEPT);
  const slowStarts = state.recent.filter(isSlow).length;
  // It ends as it begins: with most of the last starts.
  state.slow = taught && (state.slow ? slowStarts > 1 : slowStarts >= parameters.starts);
}

/** The middle value; 0 of none. */
function medianOf(values: readonly number[]): number {
  const sorted = values.toSorted((left, right) => left - right);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}

/**
 * Slow after long stands and quick after short ones: the water drains back. Slow after any: air comes in on the way,
 * the usual reason (common practice).
 */
function causeOf({ recent, stood }: State, slowSeconds: number): string {
  const quickShort = recent.some(
    (seconds, index) => seconds < slowSeconds && (stood[index] ?? 0) < SHORT_STAND_SECONDS,
  );
  const slowShort = recent.some(
    (seconds, index) => seconds >= slowSeconds && (stood[index] ?? 0) < SHORT_STAND_SECONDS,
  );
  return quickShort && !slowShort ? 'drained-back' : 'air-leak';
}

function describe(state: State, _: Facts, parameters: Parameters): Finding {
  const usual = medianOf(state.usual);
  const slow = state.recent.filter((one) => one >= parameters.timesUsual * usual);
  const first = state.recent.findIndex((one) => one >= parameters.timesUsual * usual);
  const from = state.recentAt[first];
  return {
    cause: causeOf(state, parameters.timesUsual * usual),
    ...(from === undefined ? {} : { from }),
    evidence: {
      usualSeconds: usual,
      recentSeconds: state.recent,
      usualRatio: usual > 0 ? Math.round((medianOf(slow) / usual) * 10) / 10 : null,
      stoodMinutes: state.stood.map((seconds) => Math.round(seconds / 60)),
    },
  };
}

export const slowPrime = defineDetector<'slow-prime', State>({
  detector: 'slow-prime',
  hears: ['reading'],
  learntVersion: ({ changes }) => changes,
  initial: () => ({ usual: [], recent: [], recentAt: [], stood: [], counted: 0, slow: false, changes: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
