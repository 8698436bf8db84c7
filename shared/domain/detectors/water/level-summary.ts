import { weightedMedian } from '../load/watts-sketch.ts';
import { type LevelDay, medianOf, type WattsLevel } from './watts-level.ts';

/** What a level tells: watts in W, shares of them, local days since 1970; 0 or NaN where it does not know. */
export type LevelSummary = {
  readonly usualWatts: number;
  readonly usualSpread: number;
  /** The most it drew for days: with a clean filter. */
  readonly cleanWatts: number;
  /** Median of the last three days, today among them. */
  readonly watts3Days: number;
  readonly sinceDay: number;
  /** The largest fall from one day to the next as a share of the whole fall from clean to now. */
  readonly atOnce: number;
  readonly yesterdayWatts: number;
};

const USUAL_DAYS = 14;
/** Three ten-minute means over two starts: the half hour after which a band is valid. */
const VALID_SAMPLES = 3;
const VALID_STARTS = 2;
/** The clean level is held for most of nine days, so that a bypass left open for some days is not taken for it. */
const CLEAN_DAYS = 9;
const FEWEST_CLEAN_DAYS = 3;
const CURRENT_DAYS = 3;
/** Today counts once it has half an hour, and three days must lie within six. */
const TODAY_SAMPLES = 3;
const WITHIN_DAYS = 6;

/**
 * Sums a level up. The usual watts are the weighted median of fourteen days without alarm time, today included.
 * `before` is the last summary, where no day was closed since.
 *
 * @example summarizeLevel(level).usualWatts // 812
 */
export function summarizeLevel(level: WattsLevel, before?: LevelSummary): LevelSummary {
  const today = todayOf(level);
  const past = level.days.filter(isUsual);
  const usual = [...past.slice(1 - USUAL_DAYS), ...today.filter(isUsual)];
  const samples = usual.reduce((sum, [, , count]) => sum + count, 0);
  const isValid = samples >= VALID_SAMPLES && level.starts >= VALID_STARTS;
  const usualWatts = isValid ? (weightedMedian(usual.map(([, value, weight]) => ({ value, weight }))) ?? 0) : 0;
  const cleanWatts = before === undefined ? findClean(past) : before.cleanWatts;
  return { usualWatts, usualSpread: spreadOf(usual, usualWatts), cleanWatts, ...findFall(level, today, cleanWatts) };
}

const isUsual = ([, , , , alarmed]: LevelDay): boolean => alarmed === 0;

function todayOf({ samples, day, alarmed }: WattsLevel): LevelDay[] {
  if (samples.length === 0) return [];
  return [[day, medianOf(samples), samples.length, 0, alarmed ? 1 : 0]];
}

function spreadOf(days: readonly LevelDay[], usualWatts: number): number {
  if (usualWatts === 0) return 0;
  const away = days.map(([, watts, weight, spread]) => ({ value: spread + Math.abs(watts - usualWatts), weight }));
  return (1.4826 * (weightedMedian(away) ?? 0)) / usualWatts;
}

function findClean(past: readonly LevelDay[]): number {
  if (past.length < FEWEST_CLEAN_DAYS) return 0;
  let most = 0;
  for (let from = 0; from === 0 || from + CLEAN_DAYS <= past.length; from += 1)
    most = Math.max(most, medianOf(past.slice(from, from + CLEAN_DAYS).map(([, watts]) => watts)));
  return most;
}

function findFall(
  level: WattsLevel,
  today: readonly LevelDay[],
  cleanWatts: number,
): Pick<LevelSummary, 'watts3Days' | 'sinceDay' | 'atOnce' | 'yesterdayWatts'> {
  const yesterdayWatts = level.days.at(-1)?.[1] ?? 0;
  const days = [...level.days, ...today.filter(([, , count]) => count >= TODAY_SAMPLES)];
  const current = days.slice(-CURRENT_DAYS);
  const first = current[0]?.[0] ?? 0;
  // The three days judged are not those that the clean level was learnt from.
  const few = level.days.length < FEWEST_CLEAN_DAYS + CURRENT_DAYS - 1 || current.length < CURRENT_DAYS;
  if (cleanWatts === 0 || few || level.day - first >= WITHIN_DAYS)
    return { watts3Days: 0, sinceDay: 0, atOnce: 0, yesterdayWatts };
  const watts3Days = medianOf(current.map(([, watts]) => watts));
  const fall = cleanWatts - watts3Days;
  // A speed that rests for days falls by what those days took together.
  const steps = days.map(([day, watts], index) => {
    const [dayBefore, wattsBefore] = days[index - 1] ?? [day, watts];
    return (wattsBefore - watts) / Math.max(1, day - dayBefore);
  });
  const low = days.findLastIndex(([, watts]) => cleanWatts - watts < 0.75 * fall);
  const sinceDay = days[low + 1]?.[0] ?? first;
  return { watts3Days, sinceDay, atOnce: fall > 0 ? Math.max(0, ...steps) / fall : 0, yesterdayWatts };
}
