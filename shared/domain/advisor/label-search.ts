import { type CompletionBound, completionAt } from './completion-bound.ts';
import type { FlatProblem } from './flat-problem.ts';
import { meetsNeeds, type Trace, traceChoices } from './follow-bound.ts';
import { keepBest, type Label } from './keep-best.ts';

/** The labels of every count of entries used and every choice, side by side. */
type Front = readonly (readonly Label[])[];

/** A search under way: the best program seen, and the bounds that hold its labels down. */
export type LabelSearch = {
  readonly flat: FlatProblem;
  readonly tolerance: number;
  bounds: readonly CompletionBound[];
  best: Trace | undefined;
  /** What a program must cost less than to be worth finding. */
  enough: number;
  labels: number;
};

/** More labels than this and the search gives up its proof; ordinary days take some thousands. */
export const MOST_LABELS = 60_000;
/** A whole day at one speed leads into itself without a change, and is one entry still. */
export const entriesOf = ({ entries, choices }: Trace): number =>
  entries === 0 && choices.some((choice) => choice > 0) ? 1 : entries;

/** Keeps a program that fits, where it is cheaper than the best seen. */
export function remember(search: LabelSearch, trace: Trace): void {
  const fits = entriesOf(trace) <= search.flat.problem.entryLimit && meetsNeeds(search.flat.problem, trace);
  if (!fits || !(trace.cost < (search.best?.cost ?? Number.POSITIVE_INFINITY))) return;
  search.best = trace;
  search.enough = trace.cost - search.tolerance * Math.abs(trace.cost);
}

/** The label one slot on, or undefined where no way on from it is cheaper than the best program known. */
function extend(search: LabelSearch, label: Label, slot: number, choice: number, used: number): Label | undefined {
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
function listHopeful(search: LabelSearch, labels: readonly Label[], slot: number, used: number): number[] {
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
function advance(search: LabelSearch, front: Front, slot: number): Front {
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

/**
 * Searches every program that comes from one choice, slot by slot, and remembers the cheapest that meets the needs. It
 * gives up, and remembers nothing more, at `MOST_LABELS`.
 */
export function searchFrom(search: LabelSearch, firstChoice: number): void {
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
