import { addDeed, type Pump } from '#simulator/pump.ts';
import { createRandom } from '#simulator/random.ts';
import { planHouseholdDay } from './household-day.ts';
import { planWeeklyStop } from './weekly-stop.ts';

const DAY_MS = 86_400_000;

/** Lets a pad live from `from` on: every local midnight the day is planned, from a seed of its own. */
export function liveOrdinarily(pump: Pump, seed: string, from: number): void {
  const day = Math.floor((from + pump.zone.offsetAt(from)) / DAY_MS) + 1;
  const dayStart = day * DAY_MS - pump.zone.offsetAt(day * DAY_MS - pump.zone.offsetAt(from));
  addDeed(pump, dayStart, (_, at) => {
    planDay(pump, seed, day, at);
    liveOrdinarily(pump, seed, at + DAY_MS / 2);
  });
}

function planDay(pump: Pump, seed: string, day: number, dayStart: number): void {
  const random = createRandom(`${seed}/${pump.spec.serial}/day-${day}`);
  // 1 January 1970 was a Thursday: 4, counting from Monday = 1.
  const weekday = ((day + 3) % 7) + 1;
  if (weekday === pump.spec.stopWeekday) planWeeklyStop(pump, random, dayStart);
  if (pump.spec.lived) planHouseholdDay(pump, random, dayStart);
}
