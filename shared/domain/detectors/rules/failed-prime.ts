import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { isNearNoFlow, type PrimeCause, RAGGED_SHARE, rankPrimeCauses } from './prime-causes.ts';

/** The cause that was found, how much spoke for it, and the start in which it was found. */
type State = { cause: string; weight: number; startedAt: number };
type Parameters = RuleParameters<'failed-prime'>;

/**
 * A pump that runs and carries no load, once its second try has had its time or three minutes past its prime, at
 * whatever speed; and one that gave up after its tries.
 */
function judge(_: State, facts: Facts, parameters: Parameters): Judgement {
  const { load, stands, now, context, control } = facts;
  if (!load.running) {
    if (load.failedTries >= parameters.tries) return ABNORMAL;
    return stands('failed-prime') ? UNJUDGED : NORMAL;
  }
  if (load.primed === undefined || load.basis === 'none') return UNJUDGED;
  if (load.primed) return NORMAL;
  // Load lost after a good prime is `loss-of-prime`.
  if (load.primedOnce) return UNJUDGED;
  // Load that comes this very moment is given its time.
  if (control.rampOver && !load.dry && !facts.stands('failed-prime')) return UNJUDGED;
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

/** A better sign may change the first finding, the same sign a little weaker or stronger does not. */
const BETTER_BY = 1.5;

function settleCause(state: State, { load }: Facts, ranked: readonly PrimeCause[], raised: boolean): string {
  const [first] = ranked;
  if (!raised || (first !== undefined && first.weight >= state.weight + BETTER_BY && load.primed === false)) {
    state.cause = first?.cause ?? 'unknown';
    state.weight = first?.weight ?? 0;
    state.startedAt = load.startedAt;
  }
  // Load that came after all, in the same run and with nobody's help: it had the whole lift to draw.
  const cameByItself =
    load.primed === true &&
    load.startedAt === state.startedAt &&
    state.cause === 'air-leak' &&
    load.tryRaggedness < RAGGED_SHARE;
  return cameByItself ? 'drained-back' : state.cause;
}

/** The figures of the fastest speed that this start held without load, which is where watts tell most of the water. */
function describe(state: State, facts: Facts, _: Parameters, { raised }: Spoken): Finding {
  const { load } = facts;
  const primedWatts = load.wattsAt(load.triedRpm);
  const ranked = rankPrimeCauses(facts);
  const noFlow = isNearNoFlow(facts);
  const from = load.firstTryAt === 0 ? load.startedAt : load.firstTryAt;
  return {
    cause: settleCause(state, facts, ranked, raised),
    ...(from === 0 ? {} : { from }),
    evidence: {
      tries: load.failedTries + (load.running ? 1 : 0),
      rpm: load.triedRpm,
      watts: load.triedWatts,
      primedWatts: Math.round(primedWatts),
      loadShare: primedWatts > 0 ? Math.round((load.triedWatts / primedWatts) * 100) / 100 : null,
      loadCameAndWent: load.caught,
      ...(noFlow === undefined ? {} : { wattsOfNoFlow: noFlow }),
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
  looksAgainOnReturn: true,
  initial: () => ({ cause: 'unknown', weight: 0, startedAt: 0 }),
  judge,
  describe,
});
