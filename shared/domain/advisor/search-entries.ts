import { buildCompletionBound, type CompletionBound, completionAt, dualValue, type Worth } from './completion-bound.ts';
import type { EntryProblem, EntrySolution } from './entry-problem.ts';
import { findWorth } from './find-worth.ts';
import { type FlatProblem, flattenProblem } from './flat-problem.ts';
import { followBound, meetsNeeds, type Trace, traceChoices } from './follow-bound.ts';
import { keepBest, type Label } from './keep-best.ts';
import { polishChoices } from './polish-choices.ts';

/** The labels of every count of entries used and every choice, side by side. */
type Front = readonly (readonly Label[])[];

type Search = {
  readonly flat: FlatProblem;
  readonly tolerance: number;
  bounds: readonly CompletionBound[];
  best: Trace | undefined;
  /** What a program must cost less than to be worth finding. */
  enough: number;
  labels: number;
};

export type SearchOptions = {
  /** A program within this share of the best there is counts as the best; 0 for exactly the best. */
  readonly tolerance?: number;
  /** A program to beat, of fewer entries perhaps. */
  readonly known?: EntrySolution | undefined;
  /** What a counted slot is worth, where that is known from a like problem. */
  readonly perCount?: number | undefined;
};

export type FoundEntries = { readonly solution: EntrySolution; readonly proved: boolean };

/** More labels than this and the search gives up its proof; ordinary days take some thousands. */
const MOST_LABELS = 60_000;
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

/** A whole day at one speed leads into itself without a change, and is one entry still. */
const entriesOf = ({ entries, choices }: Trace): number =>
  entries === 0 && choices.some((choice) => choice > 0) ? 1 : entries;

function remember(search: Search, trace: Trace): void {
  const fits = entriesOf(trace) <= search.flat.problem.entryLimit && meetsNeeds(search.flat.problem, trace);
  if (!fits || !(trace.cost < (search.best?.cost ?? Number.POSITIVE_INFINITY))) return;
  search.best = trace;
  search.enough = trace.cost - search.tolerance * Math.abs(trace.cost);
}

/** The label one slot on, or undefined where no way on from it is cheaper than the best program known. */
function extend(search: Search, label: Label, slot: number, choice: number, used: number): Label | undefined {
  const { flat } = search;
  const { wantedGallons, wantedCount, entryLimit } = flat.problem;
  const at = slot * flat.width + choice;
  const starts = label.choice === 0 && choice !== 0;
  const cost = label.cost + (flat.cost[at] ?? 0) + (starts ? (flat.startCost[at] ?? 0) : 0);
  const moved = (flat.gallons[at] ?? 0) - (starts ? (flat.startLoss[at] ?? 0) : 0);
  const gallons = Math.min(wantedGallons, label.gallons + moved);
  const count = Math.min(wantedCount, label.count + (flat.counts[at] ?? 0));
  for (const bound of search.bounds) {
    const rest = completionAt(bound, slot + 1, entryLimit - used, choice);
    const missing = bound.perGallon * (wantedGallons - gallons) + bound.perCount * (wantedCount - count);
    if (!(cost + rest + missing < search.enough)) return undefined;
  }
  search.labels += 1;
  return { cost, gallons, count, choice, before: label };
}

/**
 * The choices that some label could change to and still end cheaper than the best program known, by the sharpest bound:
 * the label that stands best in it stands for them all.
 */
function listHopeful(search: Search, labels: readonly Label[], slot: number, used: number): number[] {
  const { flat, bounds } = search;
  const { entryLimit, wantedGallons, wantedCount } = flat.problem;
  const [bound] = bounds;
  if (bound === undefined || used > entryLimit) return [];
  const { perGallon, perCount } = bound;
  let least = Number.POSITIVE_INFINITY;
  for (const { cost, gallons, count } of labels) least = Math.min(least, cost - perGallon * gallons - perCount * count);
  least += perGallon * wantedGallons + perCount * wantedCount;
  const hopeful: number[] = [];
  for (let choice = 1; choice < flat.width; choice += 1) {
    const at = slot * flat.width + choice;
    const step = (flat.cost[at] ?? 0) - perGallon * (flat.gallons[at] ?? 0) - perCount * (flat.counts[at] ?? 0);
    if (least + step + completionAt(bound, slot + 1, entryLimit - used, choice) < search.enough) hopeful.push(choice);
  }
  return hopeful;
}

/** Leaves out what another label in the same choice beats that has used no more entries. */
function thinOut(front: readonly Label[][], width: number, wantedCount: number): Label[][] {
  const thinned: Label[][] = [];
  const best: Label[][] = Array.from({ length: width }, () => []);
  front.forEach((labels, at) => {
    const choice = at % width;
    const fewer = best[choice] ?? [];
    const kept = new Set(keepBest([...fewer, ...labels], wantedCount));
    thinned.push(labels.filter((label) => kept.has(label)));
    best[choice] = [...kept];
  });
  return thinned;
}

/** All labels after one more slot: those that stay, those that go off, and those that change to another speed. */
function advance(search: Search, front: Front, slot: number): Front {
  const { width, problem } = search.flat;
  const next: Label[][] = Array.from({ length: front.length }, () => []);
  const add = (labels: readonly Label[], choice: number, used: number): void => {
    for (const label of labels) {
      const longer = extend(search, label, slot, choice, used);
      if (longer !== undefined) next[used * width + choice]?.push(longer);
    }
  };
  for (let used = 0; used <= problem.entryLimit; used += 1) {
    const off = front[used * width] ?? [];
    const running = front.slice(used * width + 1, (used + 1) * width).flat();
    const pool = keepBest(running, problem.wantedCount);
    for (let choice = 0; choice < width; choice += 1) add(front[used * width + choice] ?? [], choice, used);
    add(pool, 0, used);
    for (const choice of listHopeful(search, off, slot, used + 1)) add(off, choice, used + 1);
    for (const choice of listHopeful(search, pool, slot, used + 1)) add(pool, choice, used + 1);
  }
  return thinOut(next, width, problem.wantedCount);
}

const choicesOf = (label: Label): number[] => {
  const choices: number[] = [];
  for (let at: Label | undefined = label; at?.before !== undefined; at = at.before) choices.push(at.choice);
  return choices.reverse();
};

/** Searches every program that comes from one choice, and remembers the cheapest that meets the needs. */
function searchFrom(search: Search, firstChoice: number): void {
  const { problem, width } = search.flat;
  const start: Label = { cost: 0, gallons: 0, count: 0, choice: firstChoice, before: undefined };
  const size = (problem.entryLimit + 1) * width;
  let front: Front = Array.from({ length: size }, (_, at) => (at === firstChoice ? [start] : []));
  for (let slot = 0; slot < problem.slots.length && search.labels < MOST_LABELS; slot += 1)
    front = advance(search, front, slot);
  if (search.labels >= MOST_LABELS) return;
  for (const label of front.flat())
    if (!problem.cyclic || label.choice === firstChoice)
      remember(search, traceChoices(problem, choicesOf(label), firstChoice));
}

/** Searches the programs from each first choice that could still be cheaper, the most promising first. */
function searchAll(search: Search, worth: Worth, dearest: Worth): void {
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
 * Finds the cheapest program of at most `entryLimit` entries on the grid, exactly: dynamic programming over slots,
 * entries used and choices, keeping every part of a day that no other beats, and leaving out those whose Lagrangian
 * bound shows that they cannot end cheaper than the best found. `proved` is false only where that took too many parts; the program is then the best one seen. undefined where no
 * program meets the needs.
 *
 * @example searchEntries(problem) // { solution: { choices: [0, 0, 14, …], cost: 1_912_000, entries: 3 }, proved: true }
 */
export function searchEntries(problem: EntryProblem, options: SearchOptions = {}): FoundEntries | undefined {
  const { tolerance = TOLERANCE, known, perCount } = options;
  const flat = flattenProblem(problem);
  const search: Search = { flat, tolerance, bounds: [], best: undefined, enough: costCeiling(problem), labels: 0 };
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
