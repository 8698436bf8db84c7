import type { EntryProblem } from './entry-problem.ts';

/**
 * A day's problem laid out flat, slot by slot, for loops that run millions of times. `startWorth` of a gallon lost at a
 * start is reckoned by the loops themselves.
 */
export type FlatProblem = {
  readonly problem: EntryProblem;
  readonly slots: number;
  readonly width: number;
  readonly cost: Float64Array;
  readonly gallons: Float64Array;
  readonly counts: Float64Array;
  readonly startCost: Float64Array;
  readonly startLoss: Float64Array;
};

/** Lays a day out flat. A choice that a slot does not give costs Infinity there. */
export function flattenProblem(problem: EntryProblem): FlatProblem {
  const width = problem.slots[0]?.cost.length ?? 0;
  const layOut = (pick: (slot: EntryProblem['slots'][number]) => readonly number[], missing: number): Float64Array => {
    const flat = new Float64Array(problem.slots.length * width).fill(missing);
    problem.slots.forEach((slot, index) => {
      for (let choice = 0; choice < width; choice += 1) flat[index * width + choice] = pick(slot)[choice] ?? missing;
    });
    return flat;
  };
  return {
    problem,
    slots: problem.slots.length,
    width,
    cost: layOut((slot) => slot.cost, Number.POSITIVE_INFINITY),
    gallons: layOut((slot) => slot.gallons, 0),
    counts: layOut((slot) => slot.counts, 0),
    startCost: layOut((slot) => slot.startCost, 0),
    startLoss: layOut((slot) => slot.startLoss, 0),
  };
}
