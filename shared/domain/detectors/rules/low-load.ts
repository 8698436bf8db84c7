import { DAY_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { staysCalm } from '../water/stay-calm.ts';

/**
 * At which speed it was seen, what was seen, how far the flow or the watts fell, and how it came. `byWatts` = it came
 * slowly on a pump whose flow the readings do not tell.
 */
type State = { rpm: number; calmSince: number; slow: boolean; byWatts: boolean; drop: number; cause: string };
type Parameters = RuleParameters<'low-load'>;

/** A lower speed shows less of the same trouble in its watts: only a load near the usual one counts there. */
const AS_USUAL_RATIO = 0.94;
/** Less than this share of the fall that is worth a note is none. */
const WHOLE_SHARE = 0.33;
const SAME_SPEED_SHARE = 0.97;
/** A fall of which this much came from one day to the next came at once. */
const AT_ONCE_SHARE = 0.7;
/** Yesterday's watts this far under the usual ones: it has been falling for days. */
const FALLING_RATIO = 0.93;
/** Watts that differ this much from day to day by themselves need a deeper fall. */
const TIMES_SPREAD = 3;
const WIDEST_SUDDEN_SHARE = 0.35;

/** Less load than usual at one speed and one setting of the valves: at once by the watts, over days by the flow. */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { water, control } = facts;
  if (Number.isNaN(water.ratio)) return UNJUDGED;
  const isDown = water.dropOfDays >= parameters.noteShare || water.wattsDropOfDays >= parameters.noteWattsShare;
  if (state.rpm === 0 && water.ratio > AS_USUAL_RATIO && !isDown) return NORMAL;
  const stands = facts.stands('low-load');
  if (!stands) state.byWatts = Number.isNaN(water.dropOfDays) && water.wattsDropOfDays >= parameters.noteWattsShare;
  const slow = isSlow(state, facts, parameters);
  const share = Math.min(WIDEST_SUDDEN_SHARE, Math.max(parameters.suddenShare, TIMES_SPREAD * water.usualSpread));
  const sudden = water.ratio < 1 - share * (stands ? 1 - parameters.deadbandShare : 1);
  if (slow || sudden) {
    if (!stands || (sudden && control.rpm > state.rpm)) state.rpm = control.rpm;
    if (!stands) state.slow = slow;
    state.calmSince = 0;
    return ABNORMAL;
  }
  // Below the speed at which it was seen a lesser fall proves nothing.
  const calm = staysCalm(state, water.ratio >= AS_USUAL_RATIO, facts, parameters.offDelaySeconds);
  if (control.rpm < SAME_SPEED_SHARE * state.rpm && !calm) return UNJUDGED;
  if (stands && state.slow) return isFlowBack(state, facts, parameters) ? NORMAL : UNJUDGED;
  if (!stands) state.rpm = 0;
  return NORMAL;
}

/**
 * The watts of an alarm that came over days may be usual by now: only the flow tells that it is over, and at another
 * speed, where it is read otherwise, only one that is nearly whole.
 */
function isFlowBack(state: State, facts: Facts, parameters: Parameters): boolean {
  const sameSpeed = Math.abs(facts.control.rpm / state.rpm - 1) <= 1 - SAME_SPEED_SHARE;
  const { now, noteShare } = fallOf(state, facts, parameters);
  return now < (sameSpeed ? noteShare * (1 - parameters.deadbandShare) : noteShare * WHOLE_SHARE);
}

type Fall = {
  readonly ofDays: number;
  readonly now: number;
  readonly noteShare: number;
  readonly alarmShare: number;
};

/** The fall over days: of the flow where the readings tell it, else of the watts at one speed, which fall by half as much. */
function fallOf({ byWatts }: State, { water }: Facts, parameters: Parameters): Fall {
  return byWatts
    ? {
        ofDays: water.wattsDropOfDays,
        now: water.wattsDropNow,
        noteShare: parameters.noteWattsShare,
        alarmShare: parameters.alarmWattsShare,
      }
    : {
        ofDays: water.dropOfDays,
        now: water.dropNow,
        noteShare: parameters.noteShare,
        alarmShare: parameters.alarmShare,
      };
}

/** Three days' median of the flow is down, and so it is by the last ten minutes; once said, those alone tell. */
function isSlow(state: State, facts: Facts, parameters: Parameters): boolean {
  const { ofDays, now, noteShare } = fallOf(state, facts, parameters);
  const least = noteShare * (1 - parameters.deadbandShare);
  return (ofDays >= noteShare || (state.slow && facts.stands('low-load'))) && now >= least;
}

function causeOf(state: State, { water }: Facts): string {
  if (state.slow) return water.dropAtOnce >= AT_ONCE_SHARE ? 'sudden' : 'slow';
  return water.ratioYesterday < FALLING_RATIO ? 'slow' : 'sudden';
}

function describe(state: State, facts: Facts, parameters: Parameters, { raised }: Spoken): Finding {
  const { water, load } = facts;
  if (!raised) state.cause = causeOf(state, facts);
  const flowDrop = water.dropOfDays >= 0 ? water.dropOfDays : water.dropNow;
  const { ofDays, now, alarmShare } = fallOf(state, facts, parameters);
  const fall = ofDays >= 0 ? ofDays : now;
  if (!raised) state.drop = state.slow ? fall : 1 - water.ratio;
  // Each speed reads the fall a little otherwise: the deepest counts while the alarm stands.
  else if (state.slow && fall > state.drop) state.drop = fall;
  // What came at once is an alarm however far it went; what came over days waits for the next stop at first.
  const note = state.slow && state.drop < alarmShare;
  return {
    cause: state.cause,
    ...(state.slow && water.dropSinceDay > 0 ? { from: startOfDay(water.dropSinceDay, facts) } : {}),
    alarmClass: note ? 'note' : 'alarm',
    priority: note ? 'note' : 'soon',
    evidence: {
      drop: round(state.drop),
      rpm: Math.round(facts.control.rpm),
      watts: Math.round(load.watts),
      usualWatts: Math.round(state.slow && water.cleanWatts > 0 ? water.cleanWatts : water.usualWatts),
      flowDrop: Number.isFinite(flowDrop) ? round(flowDrop) : null,
      gpm: Number.isFinite(water.gpm) ? Math.round(water.gpm) : null,
      usualGpm: Number.isFinite(water.cleanGpm) ? Math.round(water.cleanGpm) : null,
    },
  };
}

const startOfDay = (localDay: number, { zoneOffsetMinutes }: Facts): number =>
  localDay * DAY_MS - zoneOffsetMinutes * MINUTE_MS;

const round = (share: number): number => Math.round(share * 100) / 100;

export const lowLoad = defineDetector<'low-load', State>({
  detector: 'low-load',
  hears: ['reading'],
  initial: () => ({ rpm: 0, calmSince: 0, slow: false, byWatts: false, drop: 0, cause: 'sudden' }),
  judge,
  delaySeconds: (state, _, parameters) => (state.slow ? 0 : parameters.delaySeconds),
  describe,
});
