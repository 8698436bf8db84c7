import { buildCompletionBound, type CompletionBound, completionAt, dualValue, type Worth } from './completion-bound.ts';
import type { EntryProblem } from './entry-problem.ts';
import type { FlatProblem } from './flat-problem.ts';
import { followBound, type Trace, traceChoices } from './follow-bound.ts';

/** A program to start from, and the choice before its first slot. */
export type Seed = { readonly trace: Trace; readonly first: number };

/**
 * The worth at which the Lagrangian bound is highest, that bound (no program costs less), the programs met on
 * the way that lead nearest to it, and a worth far above every cost.
 */
export type FoundWorth = {
  readonly worth: Worth;
  readonly least: number;
  readonly seeds: readonly Seed[];
  readonly dearest: Worth;
};

const STEPS = 22;
const GOLDEN = (Math.sqrt(5) - 1) / 2;
/** So far above the dearest that water out of reach is dearer than any program. */
const FAR = 100;
/** So many programs are kept, those of the highest bounds. */
const MOST_SEEDS = 8;

/** Looks for the highest value of a concave function between 0 and `most`, by golden section. */
function findPeak(valueAt: (x: number) => number, most: number): number {
  let [low, high] = [0, most];
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [atLeft, atRight] = [valueAt(left), valueAt(right)];
  for (let step = 0; step < STEPS; step += 1) {
    if (atLeft > atRight) {
      high = right;
      [right, atRight] = [left, atLeft];
      left = high - GOLDEN * (high - low);
      atLeft = valueAt(left);
    } else {
      low = left;
      [left, atLeft] = [right, atRight];
      right = low + GOLDEN * (high - low);
      atRight = valueAt(right);
    }
  }
  return atLeft > atRight ? left : right;
}

/** What no gallon and no counted slot of a day costs: at this worth as much of both is taken as there is. */
function aboveAll(problem: EntryProblem): Worth {
  let [perGallon, perCount] = [0, 0];
  for (const { cost, gallons, startCost } of problem.slots)
    cost.forEach((value, choice) => {
      if (!Number.isFinite(value)) return;
      const whole = Math.abs(value) + (startCost[choice] ?? 0);
      if ((gallons[choice] ?? 0) > 0) perGallon = Math.max(perGallon, whole / (gallons[choice] ?? 1));
      perCount = Math.max(perCount, whole);
    });
  return { perGallon: 2 * perGallon, perCount: problem.wantedCount > 0 ? 2 * perCount : 0 };
}

/** The first choice from which a table's bound is lowest: off, where the day does not lead into itself. */
function bestFirst({ problem, width }: FlatProblem, bound: CompletionBound): number {
  let best = 0;
  for (let first = 1; problem.cyclic && first < width; first += 1)
    if (completionAt(bound, 0, problem.entryLimit, first) < completionAt(bound, 0, problem.entryLimit, best))
      best = first;
  return best;
}

/**
 * Finds what water and counted slots are worth in the best Lagrangian bound of a day, by golden section, and the
 * programs that the worths tried lead to. A day that leads into itself is let end anywhere, which holds for every first
 * choice alike. `knownPerCount` spares the search for the worth of a counted slot, its longest part.
 */
export function findWorth(flat: FlatProblem, knownPerCount?: number): FoundWorth {
  const { problem } = flat;
  const most = aboveAll(problem);
  const tried: (Seed & { readonly value: number })[] = [];
  const tryWorth = (worth: Worth): number => {
    const bound = buildCompletionBound(flat, worth, undefined);
    const first = bestFirst(flat, bound);
    const [trace, value] = [followBound(flat, bound, first), dualValue(flat, bound, first)];
    if (trace !== undefined) tried.push({ value, trace, first: problem.cyclic ? (trace.choices.at(-1) ?? 0) : 0 });
    return value;
  };
  const peakGallon = (perCount: number): number =>
    findPeak((perGallon) => tryWorth({ perGallon, perCount }), most.perGallon);
  // The highest bound of each worth of a count is concave in it, so one search nests in the other.
  const perCount =
    problem.wantedCount === 0
      ? 0
      : (knownPerCount ?? findPeak((each) => tryWorth({ perGallon: peakGallon(each), perCount: each }), most.perCount));
  const worth: Worth = { perGallon: peakGallon(perCount), perCount };
  const dearest = { perGallon: FAR * most.perGallon, perCount: FAR * most.perCount };
  tryWorth(dearest);
  const unlike = new Map(tried.map((one) => [one.trace.choices.join(), one]));
  const nearest = [...unlike.values()].sort((left, right) => right.value - left.value).slice(0, MOST_SEEDS);
  const seeds = [...nearest, ...tried.slice(-1)].map(({ trace, first }) => ({
    first,
    trace: traceChoices(problem, trace.choices, first),
  }));
  return { worth, least: Math.max(...tried.map(({ value }) => value)), seeds, dearest };
}
