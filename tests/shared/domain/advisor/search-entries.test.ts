import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { EntryProblem } from '#shared/domain/advisor/entry-problem.ts';
import { meetsNeeds, type Trace, traceChoices } from '#shared/domain/advisor/follow-bound.ts';
import { relaxVolume } from '#shared/domain/advisor/relax-volume.ts';
import { searchEntries } from '#shared/domain/advisor/search-entries.ts';
import { smallProblems } from './sample-problems.ts';

const entriesOf = ({ entries, choices }: Trace): number =>
  entries === 0 && choices.some((choice) => choice > 0) ? 1 : entries;

/** Tries every program there is. */
function bruteForce(problem: EntryProblem): number | undefined {
  const width = problem.slots[0]?.cost.length ?? 0;
  let best: number | undefined;
  const total = width ** problem.slots.length;
  for (let code = 0; code < total; code += 1) {
    const choices = problem.slots.map((_, slot) => Math.floor(code / width ** slot) % width);
    const first = problem.cyclic ? (choices.at(-1) ?? 0) : 0;
    const trace = traceChoices(problem, choices, first);
    const fits = entriesOf(trace) <= problem.entryLimit && meetsNeeds(problem, trace) && Number.isFinite(trace.cost);
    if (fits && (best === undefined || trace.cost < best)) best = trace.cost;
  }
  return best;
}

describe('search for entries', () => {
  it('finds what trying every program finds, and nothing where nothing meets the needs', () => {
    let feasible = 0;
    fc.assert(
      fc.property(smallProblems, (problem) => {
        const expected = bruteForce(problem);
        const found = searchEntries(problem, { tolerance: 0 });
        if (expected === undefined) {
          expect(found).toBeUndefined();
          return;
        }
        feasible += 1;
        expect(found?.proved).toBe(true);
        expect(found?.solution.cost).toBeCloseTo(expected, 6);
      }),
      { numRuns: 400 },
    );
    expect(feasible).toBeGreaterThan(50);
  });

  it('gives a program that costs what it says, takes the entries it says, and meets the needs', () => {
    fc.assert(
      fc.property(smallProblems, (problem) => {
        const found = searchEntries(problem);
        if (found === undefined) return;
        const { choices, cost, entries } = found.solution;
        const trace = traceChoices(problem, choices, problem.cyclic ? (choices.at(-1) ?? 0) : 0);
        expect(trace.cost).toBeCloseTo(cost, 6);
        expect(meetsNeeds(problem, trace)).toBe(true);
        expect(entries).toBeLessThanOrEqual(problem.entryLimit);
        expect(entriesOf(trace)).toBe(entries);
      }),
    );
  });

  it('never beats the relaxation, and never costs more for one entry more', () => {
    fc.assert(
      fc.property(smallProblems, (problem) => {
        const found = searchEntries(problem, { tolerance: 0 });
        const more = searchEntries({ ...problem, entryLimit: problem.entryLimit + 1 }, { tolerance: 0 });
        if (found === undefined) return;
        expect(relaxVolume(problem)?.cost).toBeLessThanOrEqual(found.solution.cost + 1e-6);
        expect(more?.solution.cost).toBeLessThanOrEqual(found.solution.cost + 1e-6);
      }),
    );
  });
});
