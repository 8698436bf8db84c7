import { type CompletionBound, completionAt } from './completion-bound.ts';
import { type EntryProblem, type EntrySolution, takeStep } from './entry-problem.ts';
import type { FlatProblem } from './flat-problem.ts';

/** A program with the water and counted slots it gives. */
export type Trace = EntrySolution & { readonly gallons: number; readonly count: number };

/** Adds a day's choices up, step by step, from the choice before its first slot. */
export function traceChoices(problem: EntryProblem, choices: readonly number[], firstChoice: number): Trace {
  let [cost, gallons, count, entries, before] = [0, 0, 0, 0, firstChoice];
  problem.slots.forEach((slot, index) => {
    const choice = choices[index] ?? 0;
    const step = takeStep(slot, before, choice);
    cost += step.cost;
    gallons += step.gallons;
    count += step.count;
    entries += step.entries;
    before = choice;
  });
  return { choices, cost, gallons, count, entries };
}

/** Whether a program gives the water and the counted slots asked for, but for the rounding of its sums. */
export const meetsNeeds = (problem: EntryProblem, { gallons, count }: Pick<Trace, 'gallons' | 'count'>): boolean =>
  gallons >= problem.wantedGallons - 1e-9 * Math.max(1, problem.wantedGallons) && count >= problem.wantedCount;

/** The choice to take next from a slot: the one that its reduced cost and the table make cheapest. */
function chooseNext(flat: FlatProblem, bound: CompletionBound, slot: number, before: number, left: number): number {
  const from = slot * flat.width;
  let [best, chosen] = [Number.POSITIVE_INFINITY, -1];
  for (let choice = 0; choice < flat.width; choice += 1) {
    const at = from + choice;
    const changes = choice !== before && choice !== 0;
    if (changes && left === 0) continue;
    const starts = changes && before === 0;
    const cost = (flat.cost[at] ?? 0) + (starts ? (flat.startCost[at] ?? 0) : 0);
    const gallons = (flat.gallons[at] ?? 0) - (starts ? (flat.startLoss[at] ?? 0) : 0);
    const rest = completionAt(bound, slot + 1, changes ? left - 1 : left, choice);
    const value = cost - bound.perGallon * gallons - bound.perCount * (flat.counts[at] ?? 0) + rest;
    if (value < best) [best, chosen] = [value, choice];
  }
  return chosen;
}

/**
 * The program that a table of completion bounds leads to from a first choice: the cheapest at the worth it was built
 * with. undefined where none goes on.
 */
export function followBound(flat: FlatProblem, bound: CompletionBound, firstChoice: number): Trace | undefined {
  let [left, before] = [flat.problem.entryLimit, firstChoice];
  const choices: number[] = [];
  for (let slot = 0; slot < flat.slots; slot += 1) {
    const choice = chooseNext(flat, bound, slot, before, left);
    if (choice < 0) return undefined;
    choices.push(choice);
    if (choice !== before && choice !== 0) left -= 1;
    before = choice;
  }
  return traceChoices(flat.problem, choices, firstChoice);
}
