import { cutMinutesOf, isDaylightSaving } from '../clocks/shift-cause.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { cutMs } from '../link/outage-time.ts';

/**
 * The last instant at which the clock was right, with the pad's zone offset then; since when it is not, by how much it
 * was off just before and when it was first seen so.
 */
type State = { goodAt: number; goodZone: number; off: boolean; badAt: number; before: number; cause: string };
type Parameters = RuleParameters<'motor-clock'>;

/** A clock that walks moves by less than this between two looks, minutes. */
const WALK_MINUTES = 5;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { motorClock, now, zoneOffsetMinutes } = facts;
  if (motorClock.basis === 'none') return UNJUDGED;
  const offset = motorClock.offsetMinutes;
  state.off = Math.abs(offset) > parameters.offMinutes - (state.off ? parameters.deadbandMinutes : 0);
  if (!state.off) {
    state.goodAt = now;
    state.goodZone = zoneOffsetMinutes;
    state.badAt = 0;
    state.before = offset;
    return NORMAL;
  }
  if (state.badAt === 0) {
    state.badAt = now;
    state.cause = causeOf(state, facts);
  }
  return ABNORMAL;
}

function causeOf({ goodAt, goodZone, badAt, before }: State, { motorClock, zoneOffsetMinutes, link }: Facts): string {
  if (goodAt === 0) return 'unknown';
  const move = { lateMinutes: -motorClock.offsetMinutes, goodAt, badAt, wallMinutes: zoneOffsetMinutes - goodZone };
  if (isDaylightSaving(move)) return 'daylight-saving';
  if (cutMinutesOf(move, link) > 0) return 'power-cut';
  // A clock that shows its own time and jumps just when the power returns has lost it there.
  if (motorClock.basis === 'says' && link.outageEnded && cutMs(link, goodAt, badAt) > 0) return 'power-cut';
  return Math.abs(motorClock.offsetMinutes - before) <= WALK_MINUTES ? 'drift' : 'unknown';
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
  initial: () => ({ goodAt: 0, goodZone: 0, off: false, badAt: 0, before: 0, cause: 'unknown' }),
  judge,
  delaySeconds,
  describe,
});
