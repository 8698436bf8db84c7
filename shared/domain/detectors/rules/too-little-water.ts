import { DAY_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { addToDay, coverageOf, restingDay, type WaterDay } from '../water/water-day.ts';

/** A whole day that counts: local day, gallons, gallons of a clean system, and the equipment that was short (mask). */
type CountedDay = [day: number, gallons: number, cleanGallons: number, short: number];
type State = { today: WaterDay; days: CountedDay[]; little: boolean; short: number };
type Parameters = RuleParameters<'too-little-water'>;

/** Days in a row may miss some that were not seen whole. */
const MISSED_DAYS = 2;
const MOST_UNKNOWN_SHARE = 0.1;

/** Judged once a day, when a local day is over. */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { today } = state;
  if (facts.localDay === today.day) {
    addToDay(today, facts);
    return UNJUDGED;
  }
  const counted = today.day !== 0 && closeDay(state, facts, parameters);
  state.today = { ...restingDay(), day: facts.localDay, offsetMinutes: facts.zoneOffsetMinutes };
  if (facts.padState !== 'open' && facts.padState !== 'vacant') state.days = [];
  return counted ? judgeDays(state, facts, parameters) : UNJUDGED;
}

/** The stretch in which the days that are judged must lie. */
const withinDays = ({ days, shortDays }: Parameters): number => Math.max(days, shortDays) + MISSED_DAYS;

/** Takes the day that is over among those that count; answers whether it was seen whole and nothing explains it. */
function closeDay({ today, days }: State, facts: Facts, parameters: Parameters): boolean {
  const { coverageShare, shortMinutes } = parameters;
  const whole = coverageOf(today, facts.zoneOffsetMinutes) >= coverageShare;
  if (!whole || today.explained || today.unknownMs > MOST_UNKNOWN_SHARE * today.turningMs) return false;
  days.push([
    today.day,
    Math.round(today.gallons),
    Math.round(today.cleanGallons),
    shortOf(today, facts, shortMinutes),
  ]);
  while (days.length > withinDays(parameters)) days.shift();
  return true;
}

/** The equipment that lacked its minimum flow for an hour; what is always in the stream only where it never had it. */
function shortOf({ shortMs, enoughMs }: WaterDay, { context }: Facts, shortMinutes: number): number {
  const least = shortMinutes * MINUTE_MS;
  return shortMs.reduce((mask, ms, index) => {
    const always = context.equipment[index]?.input === undefined;
    const isShort = ms >= least && !(always && (enoughMs[index] ?? 0) >= least);
    return isShort ? mask | (1 << index) : mask;
  }, 0);
}

function judgeDays(state: State, facts: Facts, parameters: Parameters): Judgement {
  const recent = state.days.filter(([day]) => facts.localDay - day <= withinDays(parameters));
  const last = recent.slice(-parameters.days);
  const target = targetGallons(facts);
  const [share, needed] = [meanOf(last, 1) / target, facts.stands('too-little-water') ? 1 : parameters.shortShare];
  state.little = target > 0 && last.length >= parameters.days && share < needed;
  // A day with enough water ends it: the mean of three would still be short of it for two more.
  const [, newest = 0] = recent.at(-1) ?? [];
  if (state.little && facts.stands('too-little-water') && newest >= target) state.little = false;
  const lately = recent.slice(-parameters.shortDays);
  state.short = lately.length < parameters.shortDays ? 0 : lately.reduce((mask, [, , , short]) => mask & short, ~0);
  if (state.little || state.short !== 0) return ABNORMAL;
  return last.length >= parameters.shortDays ? NORMAL : UNJUDGED;
}

/** The water to move in a day, gallons; 0 where nobody said. */
const targetGallons = ({ context }: Facts): number => (context.poolGallons ?? 0) * (context.turnoversPerDay ?? 0);

const meanOf = (days: readonly CountedDay[], column: 1 | 2): number =>
  days.reduce((sum, day) => sum + day[column], 0) / Math.max(1, days.length);

/** Too few hours, or too little flow in the hours there are: with a clean system they would have been enough. */
function causeOf({ days, little, short }: State, facts: Facts, { days: count, shortShare }: Parameters): string {
  if (!little) return short === 0 ? 'unknown' : 'low-flow';
  return meanOf(days.slice(-count), 2) >= shortShare * targetGallons(facts) ? 'low-flow' : 'short-hours';
}

function describe(state: State, facts: Facts, parameters: Parameters): Finding {
  const { context, zoneOffsetMinutes } = facts;
  const last = state.days.slice(-(state.little ? parameters.days : parameters.shortDays));
  const pool = context.poolGallons ?? 0;
  const gallons = meanOf(last, 1);
  const firstDay = last[0]?.[0] ?? facts.localDay;
  return {
    cause: causeOf(state, facts, parameters),
    from: firstDay * DAY_MS - zoneOffsetMinutes * MINUTE_MS,
    evidence: {
      turnovers: pool > 0 ? Math.round((gallons / pool) * 100) / 100 : null,
      target: context.turnoversPerDay ?? null,
      gallons: Math.round(gallons),
      cleanGallons: Math.round(meanOf(last, 2)),
      days: last.length,
      shortOfFlow: context.equipment.flatMap(({ kind }, index) => ((state.short & (1 << index)) !== 0 ? [kind] : [])),
    },
  };
}

export const tooLittleWater = defineDetector<'too-little-water', State>({
  detector: 'too-little-water',
  hears: ['reading'],
  initial: () => ({ today: restingDay(), days: [], little: false, short: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
