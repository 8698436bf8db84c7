import { buildCompletionBound, dualValue, type Worth } from './completion-bound.ts';
import type { EntryProblem, EntrySolution } from './entry-problem.ts';
import { findWorth } from './find-worth.ts';
import { flattenProblem } from './flat-problem.ts';
import { followBound, traceChoices } from './follow-bound.ts';
import { entriesOf, type LabelSearch, MOST_LABELS, remember, searchFrom } from './label-search.ts';
import { polishChoices } from './polish-choices.ts';

export type SearchOptions = {
  /** A program within this share of the best there is counts as the best; 0 for exactly the best. */
  readonly tolerance?: number;
  /** A program to beat, of fewer entries perhaps. */
  readonly known?: EntrySolution | undefined;
  /** What a counted slot is worth, where that is known from a like problem. */
  readonly perCount?: number | undefined;
};

export type FoundEntries = { readonly solution: EntrySolution; readonly proved: boolean };

/** A program within this share of the best there is counts as the best: one entry more must save two thousandths. */
const TOLERANCE = 2e-3;
/** So many first choices are tried by small steps before any is searched. */
const MOST_TRIED = 8;

/**
 * The worths whose bounds hold labels down, the sharpest first: the best one, others about it (a label short of water
 * is held best by a higher worth, one with plenty by a lower one), none, and one far above all.
 */
function listWorths({ perGallon, perCount }: Worth, dearest: Worth): Worth[] {
  const shares = perCount > 0 ? [1, 0.6, 0.3, 0, 1.5, 3] : [1];
  const about = [1, 0.8, 1.25, 0.5, 1.6, 0.2, 2.5].flatMap((share) =>
    shares.map((each) => ({ perGallon: share * perGallon, perCount: each * perCount })),
  );
  return [...about, { perGallon: 0, perCount: 0 }, dearest];
}

/** More than any program of a day can cost: what an unknown best is held to. */
const costCeiling = (problem: EntryProblem): number =>
  problem.slots.reduce((sum, { cost, startCost }) => {
    const finite = cost.filter(Number.isFinite);
    return sum + Math.max(0, ...finite) + Math.max(0, ...startCost);
  }, 1);

/** Searches the programs from each first choice that could still be cheaper, the most promising first. */
function searchAll(search: LabelSearch, worth: Worth, dearest: Worth): void {
  const { flat } = search;
  const { problem } = flat;
  const endOf = (first: number): number | undefined => (problem.cyclic ? first : undefined);
  const firsts =
    problem.cyclic && problem.entryLimit > 0 ? Array.from({ length: flat.width }, (_, choice) => choice) : [0];
  // The bound of a day that may end anywhere holds for all of them, and is built once.
  const open = buildCompletionBound(flat, worth, undefined);
  const starts = firsts
    .filter((first) => dualValue(flat, open, first) < search.enough)
    .map((first) => ({ first, bound: buildCompletionBound(flat, worth, endOf(first)) }))
    .map(({ first, bound }) => ({ first, bound, least: dualValue(flat, bound, first) }))
    .sort((left, right) => left.least - right.least);
  for (const { first, bound, least } of starts.slice(0, MOST_TRIED)) {
    const trace = least < search.enough ? followBound(flat, bound, first) : undefined;
    if (trace !== undefined) remember(search, polishChoices(problem, trace, first));
  }
  for (const { first, least } of starts) {
    if (!(least < search.enough) || search.labels >= MOST_LABELS) continue;
    search.bounds = listWorths(worth, dearest).map((one) => buildCompletionBound(flat, one, endOf(first)));
    searchFrom(search, first);
  }
}

/**
 * Finds the cheapest program of at most `entryLimit` entries on the grid: dynamic programming over slots,
 * entries used and choices, keeping every part of a day that no other beats, and leaving out those whose Lagrangian
 * bound shows that they cannot end cheaper than the best found: exact with tolerance 0, and to two
 * thousandths of the cost without one. `proved` is false only where that took too many parts; the program is then the best one seen. undefined where no
 * program meets the needs.
 *
 * @example searchEntries(problem) // { solution: { choices: [0, 0, 14, …], cost: 1_912_000, entries: 3 }, proved: true }
 */
export function searchEntries(problem: EntryProblem, options: SearchOptions = {}): FoundEntries | undefined {
  const { tolerance = TOLERANCE, known, perCount } = options;
  const flat = flattenProblem(problem);
  const search: LabelSearch = { flat, tolerance, bounds: [], best: undefined, enough: costCeiling(problem), labels: 0 };
  if (known !== undefined)
    remember(search, traceChoices(problem, known.choices, problem.cyclic ? (known.choices.at(-1) ?? 0) : 0));
  const { worth, least, seeds, dearest } = findWorth(flat, perCount);
  if (least < search.enough)
    for (const { trace, first } of seeds) remember(search, polishChoices(problem, trace, first));
  searchAll(search, worth, dearest);
  if (search.best === undefined) return undefined;
  const { choices, cost } = search.best;
  return { solution: { choices, cost, entries: entriesOf(search.best) }, proved: search.labels < MOST_LABELS };
}

/**
 * The cheapest program for each limit of entries asked for, in rising order, each found with the one before it to beat.
 * undefined where a limit is too low for the needs.
 *
 * @example searchLimits(problem, [1, 2, 4]) // [undefined, { solution: …, proved: true }, { solution: …, proved: true }]
 */
export function searchLimits(problem: EntryProblem, limits: readonly number[]): (FoundEntries | undefined)[] {
  let known: EntrySolution | undefined;
  const widest = flattenProblem({ ...problem, entryLimit: Math.max(0, ...limits) });
  const perCount = problem.wantedCount > 0 ? findWorth(widest).worth.perCount : undefined;
  return limits.map((entryLimit) => {
    const found = searchEntries({ ...problem, entryLimit }, { known, perCount });
    known = found?.solution ?? known;
    return found;
  });
}
