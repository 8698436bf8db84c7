import { zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { cutMinutesOf, isDaylightSaving } from '../clocks/shift-cause.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { cutMs } from '../link/outage-time.ts';

/** Since when it is off, 0 = it is not, and why. */
type State = { off: boolean; badAt: number; cause: string };
type Parameters = RuleParameters<'motor-clock'>;

/** A clock that walks moves by less than this between two looks, minutes. */
const WALK_MINUTES = 5;
const JUST_BACK_MS = 600_000;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { motorClock, now } = facts;
  if (motorClock.basis === 'none') return UNJUDGED;
  state.off = Math.abs(motorClock.offsetMinutes) > parameters.offMinutes - (state.off ? parameters.deadbandMinutes : 0);
  if (!state.off) {
    state.badAt = 0;
    return NORMAL;
  }
  if (state.badAt === 0) {
    state.badAt = now;
    state.cause = causeOf(facts);
  }
  return ABNORMAL;
}

function causeOf({ motorClock, zoneOffsetMinutes, link, now, context }: Facts): string {
  const { offsetMinutes, goodAt, goodOffsetMinutes } = motorClock;
  if (goodAt === 0) return 'unknown';
  // The first reading after a cut or a shift may still show the old time.
  const since = goodAt - JUST_BACK_MS;
  const wallMinutes = zoneOffsetMinutes - (zoneOffsetAt(context.zone, since) ?? zoneOffsetMinutes);
  const move = { lateMinutes: 0 - offsetMinutes, goodAt: since, badAt: now, wallMinutes };
  if (isDaylightSaving(move)) return 'daylight-saving';
  if (cutMinutesOf(move, link) > 0) return 'power-cut';
  // A clock that shows its own time and jumps just when the power returns has lost it there.
  if (motorClock.basis === 'says' && cutMs(link, now - JUST_BACK_MS, now) > 0) return 'power-cut';
  return Math.abs(offsetMinutes - goodOffsetMinutes) <= WALK_MINUTES ? 'drift' : 'unknown';
}

/** Edges have taken their time already; a clock that says so itself is given an hour. */
function delaySeconds(_: State, { motorClock }: Facts, { clockSeconds }: Parameters): number {
  return motorClock.basis === 'says' ? clockSeconds : 0;
}

function describe(state: State, { motorClock }: Facts): Finding {
  const offset = motorClock.offsetMinutes;
  return {
    cause: state.cause,
    from: state.badAt,
    evidence: {
      minutes: Math.round(Math.abs(offset)),
      direction: offset > 0 ? 'fast' : 'slow',
      knownFrom: motorClock.basis,
    },
  };
}

export const motorClock = defineDetector<'motor-clock', State>({
  detector: 'motor-clock',
  hears: ['reading'],
  initial: () => ({ off: false, badAt: 0, cause: 'unknown' }),
  judge,
  delaySeconds,
  describe,
});
