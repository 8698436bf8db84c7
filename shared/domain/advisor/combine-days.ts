import type { EntryProblem, SlotChoices } from './entry-problem.ts';
import type { DayCase } from './find-unmet-needs.ts';

/** Weekdays that are alike in everything that a program is searched by. */
export type DayGroup = { readonly weekdays: readonly number[]; readonly problem: DayCase['problem'] };

/** Puts weekdays together that have the same grid, the same prices and the same needs. */
export function groupDays(days: readonly DayCase[]): DayGroup[] {
  const groups = new Map<string, { weekdays: number[]; problem: DayCase['problem'] }>();
  for (const { weekday, grid, prices, problem } of days) {
    const key = JSON.stringify([
      grid.map((slot) => Object.values(slot).join()),
      prices,
      problem.wantedGallons,
      problem.wantedCount,
    ]);
    const group = groups.get(key) ?? { weekdays: [], problem };
    group.weekdays.push(weekday);
    groups.set(key, group);
  }
  return [...groups.values()];
}

const mean = (values: readonly number[], weights: readonly number[], total: number): number =>
  values.reduce((sum, value, index) => sum + value * (weights[index] ?? 0), 0) / total;

function combineSlots(slots: readonly SlotChoices[], weights: readonly number[], total: number): SlotChoices {
  const [first] = slots;
  const each = (pick: (slot: SlotChoices) => readonly number[], merge: (values: number[]) => number): number[] =>
    (first?.cost ?? []).map((_, choice) => merge(slots.map((slot) => pick(slot)[choice] ?? 0)));
  const weigh = (values: number[]): number => mean(values, weights, total);
  return {
    cost: each((slot) => slot.cost, weigh),
    gallons: each(
      (slot) => slot.gallons,
      (values) => Math.min(...values),
    ),
    counts: each(
      (slot) => slot.counts,
      (values) => Math.min(...values),
    ),
    startCost: each((slot) => slot.startCost, weigh),
    startLoss: each(
      (slot) => slot.startLoss,
      (values) => Math.max(...values),
    ),
  };
}

/**
 * One day that stands for all of a week: costs are the week's mean, a choice must be allowed on every day, and water and
 * hours are those of the poorest day, slot by slot. A program that serves it serves every day.
 */
export function combineDays(groups: readonly DayGroup[]): Omit<EntryProblem, 'entryLimit'> {
  const weights = groups.map(({ weekdays }) => weekdays.length);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const length = groups[0]?.problem.slots.length ?? 0;
  return {
    slots: Array.from({ length }, (_, index) =>
      combineSlots(
        groups.flatMap(({ problem }) => problem.slots[index] ?? []),
        weights,
        total,
      ),
    ),
    wantedGallons: Math.max(0, ...groups.map(({ problem }) => problem.wantedGallons)),
    wantedCount: Math.max(0, ...groups.map(({ problem }) => problem.wantedCount)),
    cyclic: true,
  };
}
