import { countChoices, type EntryProblem } from './entry-problem.ts';
import { meetsNeeds, type Trace, traceChoices } from './follow-bound.ts';
import { listStretches } from './list-stretches.ts';

const MOST_ROUNDS = 200;

const paint = (choices: readonly number[], from: number, to: number, choice: number): number[] =>
  choices.map((one, slot) => (slot >= from && slot < to ? choice : one));

/** Every program one small step away: a stretch a step faster or slower, or a border moved by one slot. */
function listNeighbours(problem: EntryProblem, choices: readonly number[]): number[][] {
  const width = countChoices(problem);
  const stretches = listStretches(choices);
  return stretches.flatMap(({ from, to, choice }, index) => {
    const before = stretches[index - 1];
    const speeds = choice === 0 ? [] : [choice - 1, choice + 1].filter((one) => one > 0 && one < width);
    const borders =
      before === undefined
        ? []
        : [paint(choices, from - 1, from, choice), paint(choices, from, from + 1, before.choice)];
    return [...speeds.map((one) => paint(choices, from, to, one)), ...borders];
  });
}

/** What is still missing, as a share of what is asked for. */
const missingShare = ({ wantedGallons, wantedCount }: EntryProblem, { gallons, count }: Trace): number =>
  Math.max(0, wantedGallons - gallons) / Math.max(1, wantedGallons) +
  Math.max(0, wantedCount - count) / Math.max(1, wantedCount);

/** Whether one program is better than another: it misses less, or it misses nothing and costs less. */
function isBetter(problem: EntryProblem, one: Trace, other: Trace): boolean {
  if (!Number.isFinite(one.cost) || one.entries > problem.entryLimit) return false;
  const [missing, others] = [missingShare(problem, one), missingShare(problem, other)];
  if (meetsNeeds(problem, one) && meetsNeeds(problem, other)) return one.cost < other.cost - 1e-9;
  return missing < others - 1e-12;
}

/** While water is missing the cheapest way to more of it goes first; afterwards the one that saves most. */
const gain = (problem: EntryProblem, from: Trace, to: Trace): number => {
  const less = missingShare(problem, from) - missingShare(problem, to);
  return less > 0 ? less / Math.max(1e-9, to.cost - from.cost) : from.cost - to.cost;
};

/**
 * Makes a program better by small steps until none helps: first towards the day's needs, then cheaper. It finds a good
 * program to start a search from, not the best one.
 */
export function polishChoices(problem: EntryProblem, start: Trace, firstChoice: number): Trace {
  let current = start;
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const better = listNeighbours(problem, current.choices)
      .filter((choices) => !problem.cyclic || choices.at(-1) === firstChoice)
      .map((choices) => traceChoices(problem, choices, firstChoice))
      .filter((trace) => isBetter(problem, trace, current));
    const [best] = better.sort((left, right) => gain(problem, current, right) - gain(problem, current, left));
    if (best === undefined) break;
    current = best;
  }
  return current;
}
