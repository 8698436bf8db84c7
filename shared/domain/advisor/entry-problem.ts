/**
 * One day on the grid, as numbers alone. Choice 0 is off; the others are speeds, slowest first. A choice that is not
 * allowed in a slot costs Infinity. Costs are what the program adds: an input that runs the motor anyway is not in it.
 */
export type SlotChoices = {
  readonly cost: readonly number[];
  readonly gallons: readonly number[];
  /** 1 where a choice counts for the hours asked for, else 0. */
  readonly counts: readonly number[];
  /** What starting from rest into each choice costs more, and what water it loses: the prime. 0 where nothing rests. */
  readonly startCost: readonly number[];
  readonly startLoss: readonly number[];
};

export type EntryProblem = {
  readonly slots: readonly SlotChoices[];
  readonly wantedGallons: number;
  readonly wantedCount: number;
  readonly entryLimit: number;
  /** Whether the last slot leads into the first one: one program for every day of the week. */
  readonly cyclic: boolean;
};

/** The choice of each slot, what it costs, and the entries it takes. */
export type EntrySolution = { readonly choices: readonly number[]; readonly cost: number; readonly entries: number };

/** What a step from one choice to the next takes in a slot: its cost, its water, its count and its entries. */
export type Step = {
  readonly cost: number;
  readonly gallons: number;
  readonly count: number;
  readonly entries: 0 | 1;
};

/**
 * The step into a choice from the one before it. Every change to a speed takes an entry; from off it also starts.
 *
 * @example takeStep(slot, 0, 3) // { cost: 210, gallons: 430, count: 1, entries: 1 }
 */
export function takeStep(slot: SlotChoices, before: number, choice: number): Step {
  const starts = before === 0 && choice !== 0;
  return {
    cost: (slot.cost[choice] ?? Number.POSITIVE_INFINITY) + (starts ? (slot.startCost[choice] ?? 0) : 0),
    gallons: (slot.gallons[choice] ?? 0) - (starts ? (slot.startLoss[choice] ?? 0) : 0),
    count: slot.counts[choice] ?? 0,
    entries: choice !== before && choice !== 0 ? 1 : 0,
  };
}

/** How many choices every slot has, off among them. */
export const countChoices = (problem: EntryProblem): number => problem.slots[0]?.cost.length ?? 0;
