import { createRandom, type Random } from '#simulator/random.ts';
import type { Zone } from './zone.ts';

/** What closes an input that no clock drives: people in the evening, or the sun on a collector. */
export type Habit = 'spa' | 'feature' | 'solar' | 'cleaning' | 'never';

type Period = { readonly from: number; readonly until: number };

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;

/** Contacts moved by habit; each local day is planned on its own from the seed, so any day can be asked for first. */
export type HabitContact = { readonly read: (at: number) => { readonly closed: boolean; readonly until: number } };

export function createHabitContact(habit: Habit, zone: Zone, seed: string): HabitContact {
  let plannedDay = Number.NaN;
  let periods: readonly Period[] = [];
  return {
    read: (at) => {
      const day = Math.floor((at + zone.offsetAt(at)) / DAY_MS);
      const midnight = day * DAY_MS - zone.offsetAt(at);
      if (day !== plannedDay) {
        plannedDay = day;
        periods = PLANS[habit](createRandom(`${seed}/${day}`), (day + 3) % 7).map(({ from, until }) => ({
          from: midnight + Math.round(from * MINUTE_MS),
          until: midnight + Math.round(until * MINUTE_MS),
        }));
      }
      const current = periods.find((period) => at >= period.from && at < period.until);
      const next = periods.find((period) => period.from > at);
      // Plans end before 23:00, so that the next midnight is never inside a period even when the clocks change.
      return {
        closed: current !== undefined,
        until: current?.until ?? next?.from ?? midnight + DAY_MS + 2 * 3_600_000,
      };
    },
  };
}

/** Periods in minutes after midnight; `weekday` counts from Monday = 0. */
const PLANS: Record<Habit, (random: Random, weekday: number) => Period[]> = {
  spa: (random, weekday) => {
    const likely = weekday === 4 || weekday === 5 ? 0.7 : 0.12;
    if (!random.chance(likely)) return [];
    const from = random.between(18 * 60, 20 * 60);
    return [{ from, until: from + random.between(45, 140) }];
  },
  feature: (random, weekday) => {
    if (!random.chance(weekday >= 5 ? 0.6 : 0.08)) return [];
    const from = random.between(12 * 60, 16 * 60);
    return [{ from, until: from + random.between(40, 180) }];
  },
  solar: (random) => {
    if (!random.chance(0.85)) return [];
    const periods: Period[] = [];
    let from = random.between(10 * 60, 11 * 60);
    const end = random.between(15 * 60, 16 * 60);
    while (from < end - 20) {
      const until = Math.min(end, from + random.between(40, 200));
      periods.push({ from, until });
      from = until + random.between(4, 20);
    }
    return periods;
  },
  cleaning: (random, weekday) => {
    if (weekday !== 6 || !random.chance(0.3)) return [];
    const from = random.between(10 * 60, 14 * 60);
    return [{ from, until: from + random.between(20, 60) }];
  },
  never: () => [],
};
