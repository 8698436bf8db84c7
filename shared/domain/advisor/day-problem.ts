import type { Micros } from '../energy/money.ts';
import { DAY_MINUTES } from '../time/local-time.ts';
import type { GridSlot } from './day-grid.ts';
import type { EntryProblem, SlotChoices } from './entry-problem.ts';
import { GRID_MINUTES, type HoursNeed } from './pad-needs.ts';
import type { SpeedOption } from './speed-option.ts';
import type { WeekMinutes } from './week-minutes.ts';

/** What every day of a request shares. `primeAt` is the prime's speed and length; none where it is switched off. */
export type DayTerms = {
  readonly speeds: readonly SpeedOption[];
  readonly speedAt: (rpm: number) => SpeedOption | undefined;
  readonly standbyWatts: number;
  readonly prime: { readonly option: SpeedOption; readonly seconds: number } | undefined;
  /** Price of a kWh by weekday (0 = Monday) and hour, micros. */
  readonly priceAt: (weekday: number, hour: number) => Micros;
  readonly gallonsPerDay: number;
  readonly hours: HoursNeed | undefined;
};

/** Micros of so many watts over so many minutes. */
const costOf = (price: Micros, watts: number, minutes: number): Micros => (price * watts * minutes) / 60_000;

/** What a prime adds to a start into a speed: its energy over what that time would take anyway, and the water it lacks. */
function primeExtra(
  terms: DayTerms,
  price: Micros,
  into: SpeedOption,
): { readonly cost: Micros; readonly loss: number } {
  if (terms.prime === undefined) return { cost: 0, loss: 0 };
  const { option, seconds } = terms.prime;
  return {
    cost: costOf(price, option.watts - into.watts, seconds / 60),
    loss: (Math.max(0, into.gpm - option.gpm) * seconds) / 60,
  };
}

function buildChoices(terms: DayTerms, slot: GridSlot, price: Micros): SlotChoices {
  const { freeMinutes, leastRpm, mostRpm, runsBefore, inputStartsRpm } = slot;
  const allowed = ({ rpm }: SpeedOption): boolean => freeMinutes === 0 || (rpm >= leastRpm && rpm <= mostRpm);
  const input = inputStartsRpm > 0 ? terms.speedAt(inputStartsRpm) : undefined;
  const inputStart = input === undefined ? { cost: 0, loss: 0 } : primeExtra(terms, price, input);
  const extras = terms.speeds.map((speed) => (runsBefore ? { cost: 0, loss: 0 } : primeExtra(terms, price, speed)));
  const wholeSlot = freeMinutes === GRID_MINUTES;
  return {
    cost: [
      freeMinutes === 0 || leastRpm === 0 ? inputStart.cost : Number.POSITIVE_INFINITY,
      ...terms.speeds.map((speed) =>
        allowed(speed) ? costOf(price, speed.watts - terms.standbyWatts, freeMinutes) : Number.POSITIVE_INFINITY,
      ),
    ],
    gallons: [-inputStart.loss, ...terms.speeds.map(({ gpm }) => gpm * freeMinutes)],
    counts: [
      0,
      ...terms.speeds.map(({ gpm }) =>
        wholeSlot && terms.hours !== undefined && gpm >= terms.hours.minimumGpm ? 1 : 0,
      ),
    ],
    startCost: [0, ...extras.map(({ cost }) => cost)],
    startLoss: [0, ...extras.map(({ loss }) => loss)],
  };
}

/** Water and hours that inputs give on a weekday whatever the program does. */
export function inputWater(
  terms: Pick<DayTerms, 'speedAt' | 'hours'>,
  weekday: number,
  inputs: WeekMinutes,
): { readonly gallons: number; readonly minutes: number } {
  let [gallons, minutes] = [0, 0];
  for (const rpm of inputs.subarray(weekday * DAY_MINUTES, (weekday + 1) * DAY_MINUTES)) {
    const gpm = rpm > 0 ? (terms.speedAt(rpm)?.gpm ?? 0) : 0;
    gallons += gpm;
    if (terms.hours !== undefined && gpm >= terms.hours.minimumGpm) minutes += 1;
  }
  return { gallons, minutes };
}

/**
 * Turns one weekday's grid into the numbers that a program is searched by: what each choice costs and moves in the
 * minutes that are the program's, what a start adds, and the water and quarter-hours still wanted beside the inputs'.
 */
export function buildDayProblem(
  terms: DayTerms,
  weekday: number,
  grid: readonly GridSlot[],
  inputs: WeekMinutes,
): Omit<EntryProblem, 'entryLimit' | 'cyclic'> {
  const given = inputWater(terms, weekday, inputs);
  const wantedMinutes = Math.max(0, (terms.hours?.hours ?? 0) * 60 - given.minutes);
  return {
    slots: grid.map((slot, index) =>
      buildChoices(terms, slot, terms.priceAt(weekday, Math.floor((index * GRID_MINUTES) / 60))),
    ),
    wantedGallons: Math.max(0, terms.gallonsPerDay - given.gallons),
    wantedCount: Math.ceil(wantedMinutes / GRID_MINUTES - 1e-9),
  };
}
