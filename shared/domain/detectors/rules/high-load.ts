import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { mostWattsShare } from '../load/most-watts-share.ts';
import { staysCalm } from '../water/stay-calm.ts';

/**
 * Since when the load is far above usual, and whether for long enough; when it was last usual and first clearly more; at
 * which speeds it was seen, with the ratio there; and the cause found.
 */
type State = {
  farSince: number;
  far: boolean;
  usualAt: number;
  calmSince: number;
  risenAt: number;
  slowRpm: number;
  slowRatio: number;
  fastRpm: number;
  fastRatio: number;
  cause: string;
};
type Parameters = RuleParameters<'high-load'>;

/** Between usual and too much in less than this is a valve; longer, something wears (common practice). */
const AT_ONCE_MS = 12 * 60_000;
const USUAL_RATIO = 1.06;
const RISEN_RATIO = 1.1;
/** Friction takes much more of a slow pump's watts than of a fast one's, water the same share of both. */
const FRICTION_MORE = 1.35;
const OTHER_SPEED = 1.2;
const SAME_SPEED = 0.97;
const AS_USUAL_RATIO = 1.03;
/** At 60 gpm a pool of 20,000 gallons is empty by then: what goes on for longer goes round. */
const LONGEST_WASTE_MS = 6 * 3_600_000;
/** Watts beyond what any flow could take are no water; the printed curve is good to some per cent. */
const BEYOND_CURVE = 1.04;

/** More watts than usual at one speed, and than with a clean filter: a filter that was cleaned is no trouble. */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { water, now } = facts;
  if (Number.isNaN(water.ratio)) return UNJUDGED;
  const ratio = ratioOf(facts);
  followRise(state, ratio, now);
  if (ratio <= USUAL_RATIO && state.slowRpm === 0) return NORMAL;
  const least = parameters.aboveShare * (facts.stands('high-load') ? 1 - parameters.deadbandShare : 1);
  if (ratio < 1 + Math.max(least, 2 * water.usualSpread)) {
    state.farSince = 0;
    const calm = staysCalm(state, water.ratio <= AS_USUAL_RATIO, facts, parameters.offDelaySeconds);
    if (isOtherSpeed(state, facts.control.rpm) && !calm) return UNJUDGED;
    if (!facts.stands('high-load')) forgetSpeeds(state);
    return NORMAL;
  }
  state.calmSince = 0;
  if (ratio < 1 + parameters.farAboveShare) state.farSince = 0;
  else if (state.farSince === 0) state.farSince = now;
  state.far = state.farSince !== 0 && now - state.farSince >= parameters.farAboveSeconds * 1000;
  seeSpeed(state, facts.control.rpm, ratio);
  return ABNORMAL;
}

/** When the load was last usual, and when it was clearly more for the first time since. */
function followRise(state: State, ratio: number, now: number): void {
  if (ratio <= USUAL_RATIO) {
    state.usualAt = now;
    state.risenAt = 0;
  } else if (ratio >= RISEN_RATIO && state.risenAt === 0) state.risenAt = now;
}

/** Another speed than the one that showed it most: a fast pump shows little of what rubs, so only a usual load ends it. */
const isOtherSpeed = ({ slowRpm, fastRpm, slowRatio, fastRatio }: State, rpm: number): boolean =>
  slowRpm !== 0 && Math.abs(rpm / (slowRatio >= fastRatio ? slowRpm : fastRpm) - 1) > 1 - SAME_SPEED;

const ratioOf = ({ water }: Facts): number =>
  water.cleanWatts > water.usualWatts ? (water.ratio * water.usualWatts) / water.cleanWatts : water.ratio;

function seeSpeed(state: State, rpm: number, ratio: number): void {
  if (state.slowRpm === 0 || rpm <= state.slowRpm) {
    state.slowRpm = rpm;
    state.slowRatio = ratio;
  }
  if (rpm >= state.fastRpm) {
    state.fastRpm = rpm;
    state.fastRatio = ratio;
  }
}

function forgetSpeeds(state: State): void {
  state.slowRpm = 0;
  state.fastRpm = 0;
}

/**
 * A valve opens from one moment to the next and gives no more load than the curve has; wear comes on, weighs more at
 * low speed, and knows no such limit. Far above and at once is the way to waste: it is short and wide.
 */
function causeOf(state: State, facts: Facts): string {
  const { slowRpm, fastRpm, slowRatio, fastRatio } = state;
  const ratio = ratioOf(facts);
  const twoSpeeds = slowRpm > 0 && fastRpm > OTHER_SPEED * slowRpm;
  if (twoSpeeds && slowRatio - 1 > FRICTION_MORE * (fastRatio - 1)) return 'rubbing';
  const isWater = twoSpeeds && slowRatio <= fastRatio;
  const cameOn =
    state.usualAt !== 0 && state.risenAt - state.usualAt > AT_ONCE_MS && facts.load.startedAt < state.usualAt;
  const cameOverDays = facts.water.ratioYesterday > USUAL_RATIO && state.usualAt < state.risenAt - AT_ONCE_MS;
  if (!isWater && (cameOn || cameOverDays)) return 'rubbing';
  if (state.far) return 'to-waste';
  const most = mostWattsShare(facts.context);
  return !isWater && most !== undefined && ratio > BEYOND_CURVE * most ? 'rubbing' : 'bypass';
}

function describe(state: State, facts: Facts, _: Parameters, { raised, onset }: Spoken): Finding {
  const { water, load, control, now } = facts;
  // Two speeds tell more than one; what was said at first stands otherwise.
  const found = causeOf(state, facts);
  if (!raised || state.cause === 'bypass') state.cause = found;
  if (state.cause === 'to-waste' && now - onset > LONGEST_WASTE_MS) state.cause = 'bypass';
  return {
    cause: state.cause,
    evidence: {
      rise: Math.round((ratioOf(facts) - 1) * 100) / 100,
      rpm: Math.round(control.rpm),
      watts: Math.round(load.watts),
      usualWatts: Math.round(Math.max(water.usualWatts, water.cleanWatts)),
      riseAtLowSpeed: state.slowRpm > 0 ? Math.round((state.slowRatio - 1) * 100) / 100 : null,
      riseAtHighSpeed: state.fastRpm > 0 ? Math.round((state.fastRatio - 1) * 100) / 100 : null,
    },
  };
}

export const highLoad = defineDetector<'high-load', State>({
  detector: 'high-load',
  hears: ['reading'],
  initial: () => ({
    farSince: 0,
    far: false,
    usualAt: 0,
    calmSince: 0,
    risenAt: 0,
    slowRpm: 0,
    slowRatio: 0,
    fastRpm: 0,
    fastRatio: 0,
    cause: 'unknown',
  }),
  judge,
  // The stretch is counted from the first reading above; far above for its own time it is said at once.
  delaySeconds: (state, _, parameters) => (state.far ? 0 : parameters.delaySeconds),
  describe,
});
