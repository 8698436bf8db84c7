import { isRecord, type Json } from '../plain-state.ts';

/** One whole day at one level: local day, median watts, ten-minute means behind it, their spread, and alarm time. */
export type LevelDay = readonly [day: number, watts: number, count: number, spread: number, alarmed: number];

/**
 * What one speed draws at one setting of the valves that inputs turn (`valves` is the mask of those closed inputs):
 * whole days, and today's ten-minute means. `alarmed` = an alarm about the load stood today.
 */
export type WattsLevel = {
  rpm: number;
  valves: number;
  starts: number;
  lastStart: number;
  day: number;
  samples: number[];
  alarmed: boolean;
  days: LevelDay[];
};

const KEPT_DAYS = 40;
const KEPT_LEVELS = 10;
/** Readings within this share of a speed belong to it. */
export const LEVEL_SHARE = 0.02;

/** The level of a speed and a setting of the valves; undefined where it has none yet. */
export const findLevel = (levels: readonly WattsLevel[], rpm: number, valves: number): WattsLevel | undefined =>
  levels.find((level) => level.valves === valves && Math.abs(level.rpm - rpm) <= LEVEL_SHARE * level.rpm);

/** The level of a speed, made where there is none; the one longest unused makes room. */
export function makeLevel(levels: WattsLevel[], rpm: number, valves: number, day: number): WattsLevel {
  const known = findLevel(levels, rpm, valves);
  if (known !== undefined) return known;
  if (levels.length >= KEPT_LEVELS) {
    const oldest = levels.reduce((least, level) => (level.day < least.day ? level : least));
    levels.splice(levels.indexOf(oldest), 1);
  }
  const level = { rpm: Math.round(rpm), valves, starts: 0, lastStart: 0, day, samples: [], alarmed: false, days: [] };
  levels.push(level);
  return level;
}

/** Adds a ten-minute mean, W; answers whether a day was closed by it. A new day counts as a start where none is seen. */
export function addSample(level: WattsLevel, watts: number, day: number, start: number, alarmed: boolean): boolean {
  const isNewDay = day !== level.day;
  const closed = isNewDay && closeDay(level);
  if (start !== level.lastStart || isNewDay) level.starts = Math.min(level.starts + 1, 99);
  level.lastStart = start;
  level.day = day;
  level.alarmed ||= alarmed;
  level.samples.push(Math.round(watts * 10) / 10);
  return closed;
}

function closeDay(level: WattsLevel): boolean {
  const watts = medianOf(level.samples);
  if (watts > 0) {
    const spread = medianOf(level.samples.map((sample) => Math.abs(sample - watts)));
    level.days.push([level.day, watts, level.samples.length, Math.round(spread * 10) / 10, level.alarmed ? 1 : 0]);
    if (level.days.length > KEPT_DAYS) level.days.shift();
  }
  forgetToday(level);
  return watts > 0;
}

/** What was measured today was not usual. */
export function forgetToday(level: WattsLevel): void {
  level.samples = [];
  level.alarmed = false;
}

/** The middle value, or the mean of the middle two; 0 of none. */
export function medianOf(values: readonly number[]): number {
  const sorted = values.toSorted((left, right) => left - right);
  const middle = sorted.length / 2;
  return ((sorted[Math.floor(middle)] ?? 0) + (sorted[Math.ceil(middle) - 1] ?? sorted[0] ?? 0)) / 2;
}

/** What seldom changes: the whole days. */
export const saveLevelDays = (levels: readonly WattsLevel[]): Json =>
  levels.map(({ rpm, valves, days }) => ({ rpm, valves, days: days.map((day) => [...day]) }));

/** What changes every ten minutes: today. */
export const saveLevelToday = (levels: readonly WattsLevel[]): Json =>
  levels.map(({ days: _, samples, ...level }) => ({ ...level, samples: [...samples] }));

/**
 * Levels from what the two saves gave; what cannot be read is learnt again.
 *
 * @example restoreLevels(undefined, undefined) // []
 */
export function restoreLevels(today: unknown, days: unknown): WattsLevel[] {
  const past = Array.isArray(days) ? days.filter(isRecord) : [];
  const current = Array.isArray(today) ? today.filter(isRecord) : [];
  return current.flatMap((saved): WattsLevel[] => {
    const { rpm, valves, starts, lastStart, day } = saved;
    if (![rpm, valves, starts, lastStart, day].every(Number.isFinite) || !Array.isArray(saved.samples)) return [];
    const known = past.find((one) => one.rpm === rpm && one.valves === valves)?.days;
    return [
      {
        ...({ rpm, valves, starts, lastStart, day } as Pick<
          WattsLevel,
          'rpm' | 'valves' | 'starts' | 'lastStart' | 'day'
        >),
        samples: saved.samples.filter((value): value is number => Number.isFinite(value)),
        alarmed: saved.alarmed === true,
        days: Array.isArray(known) ? known.filter(isLevelDay) : [],
      },
    ];
  });
}

const isLevelDay = (value: unknown): value is LevelDay =>
  Array.isArray(value) && value.length === 5 && value.every(Number.isFinite);
