import fc from 'fast-check';
import solver from 'javascript-lp-solver';
import { describe, expect, it } from 'vitest';
import type { EntryProblem } from '#shared/domain/advisor/entry-problem.ts';
import { relaxVolume } from '#shared/domain/advisor/relax-volume.ts';
import { smallProblems } from './sample-problems.ts';

/** The same relaxation as a linear program: shares of each slot over its choices. */
function solveLinearProgram(problem: EntryProblem): number | undefined {
  const variables: Record<string, Record<string, number>> = {};
  const constraints: Record<string, { min?: number; equal?: number }> = { gallons: { min: problem.wantedGallons } };
  problem.slots.forEach(({ cost, gallons }, slot) => {
    constraints[`slot${slot}`] = { equal: 1 };
    cost.forEach((value, choice) => {
      if (Number.isFinite(value))
        variables[`x${slot}_${choice}`] = { cost: value, gallons: gallons[choice] ?? 0, [`slot${slot}`]: 1 };
    });
  });
  const solved = solver.Solve({ optimize: 'cost', opType: 'min', constraints, variables }) as {
    feasible: boolean;
    result: number;
  };
  return solved.feasible ? solved.result : undefined;
}

describe('relaxed volume', () => {
  it('costs what a general linear-programming solver finds, and is out of reach when it is', () => {
    let feasible = 0;
    fc.assert(
      fc.property(smallProblems, (problem) => {
        const expected = solveLinearProgram(problem);
        const relaxed = relaxVolume(problem);
        if (expected === undefined) {
          expect(relaxed).toBeUndefined();
          return;
        }
        feasible += 1;
        expect(relaxed?.cost).toBeCloseTo(expected, 5);
      }),
      { numRuns: 500 },
    );
    expect(feasible).toBeGreaterThan(100);
  });

  it('costs more for more water, each gallon no cheaper than the one before', () => {
    fc.assert(
      fc.property(smallProblems, (problem) => {
        const at = (gallons: number) => relaxVolume({ ...problem, wantedGallons: gallons })?.cost;
        const [less, same, more] = [
          at(problem.wantedGallons - 1),
          at(problem.wantedGallons),
          at(problem.wantedGallons + 1),
        ];
        if (less === undefined || same === undefined || more === undefined) return;
        expect(same).toBeGreaterThanOrEqual(less - 1e-9);
        expect(more - same).toBeGreaterThanOrEqual(same - less - 1e-9);
      }),
    );
  });

  it('takes water beyond the need while energy has a price under nothing', () => {
    const slot = { cost: [0, -5], gallons: [0, 10], counts: [0, 0], startCost: [0, 0], startLoss: [0, 0] };
    const problem = { slots: [slot, slot], wantedGallons: 5, wantedCount: 0, entryLimit: 1, cyclic: false };

    expect(relaxVolume(problem)).toEqual({ cost: -10, costPerGallon: 0 });
  });
});
