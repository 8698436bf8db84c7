import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { rankPrimeCauses } from './prime-causes.ts';

type State = Record<string, never>;
type Parameters = RuleParameters<'failed-prime'>;

/**
 * A pump that runs and carries no load, once its second try has had its time or three minutes past its prime, at
 * whatever speed; and one that gave up after its tries.
 */
function judge(_: State, { load, stands, now, context }: Facts, parameters: Parameters): Judgement {
  if (!load.running) {
    if (load.failedTries >= parameters.tries) return ABNORMAL;
    return stands('failed-prime') ? UNJUDGED : NORMAL;
  }
  if (load.primed === undefined || load.basis === 'none') return UNJUDGED;
  if (load.primed) return NORMAL;
  // Load lost after a good prime is `loss-of-prime`.
  if (load.primedOnce) return UNJUDGED;
  if (now >= load.primeEndsAt + parameters.pastPrimeSeconds * 1000) return ABNORMAL;
  const triedMs = now - load.startedAt;
  if (
    load.failedTries + 1 >= parameters.tries &&
    triedMs >= trySeconds(context.settings.prime?.seconds ?? 0, parameters) * 1000
  ) {
    return ABNORMAL;
  }
  return UNJUDGED;
}

/** How long a try without load must last to count, s: its prime time, within limits. */
function trySeconds(primeSeconds: number, { shortestTrySeconds, longestTrySeconds }: Parameters): number {
  return Math.min(longestTrySeconds, Math.max(shortestTrySeconds, primeSeconds));
}

/** The figures of the last moment that was judged: a shaft that slows down after a try tells of nothing. */
function describe(_: State, facts: Facts): Finding {
  const { load } = facts;
  const primedWatts = load.wattsAt(load.judgedRpm);
  const ranked = rankPrimeCauses(facts);
  const from = load.firstTryAt === 0 ? load.startedAt : load.firstTryAt;
  return {
    cause: ranked[0]?.cause ?? 'unknown',
    ...(from === 0 ? {} : { from }),
    evidence: {
      tries: load.failedTries + (load.running ? 1 : 0),
      rpm: load.judgedRpm,
      watts: load.judgedWatts,
      primedWatts: Math.round(primedWatts),
      loadShare: primedWatts > 0 ? Math.round((load.judgedWatts / primedWatts) * 100) / 100 : null,
      knownFrom: load.basis,
      stoodMinutes: Math.round(load.stoodSeconds / 60),
      causes: ranked.map(({ cause }) => cause),
      because: ranked.map(({ because }) => because),
    },
  };
}

export const failedPrime = defineDetector<'failed-prime', State>({
  detector: 'failed-prime',
  hears: ['reading'],
  initial: () => ({}),
  judge,
  describe,
});
