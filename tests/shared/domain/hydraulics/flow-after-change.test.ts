import { describe, expect, it } from 'vitest';
import { findRoot } from '#shared/domain/hydraulics/find-root.ts';
import { createFlowAfterChange } from '#shared/domain/hydraulics/flow-after-change.ts';
import { wattsAt } from '#shared/domain/hydraulics/wet-end-curve.ts';
import { fitOrFail, POOL_SHEET } from './sample-wet-ends.ts';

const curve = fitOrFail(POOL_SHEET);
const flowAfter = createFlowAfterChange(curve);
const change = (rpm: number, from: number, to: number): number =>
  (wattsAt(curve, rpm, to) ?? 0) - (wattsAt(curve, rpm, from) ?? 0);

describe('the flow after a change of watts', () => {
  it.each([
    [3450, 55, 38],
    [3450, 40, 52],
    [2850, 45, 20],
    [1700, 26, 17],
  ])('at %d rpm from %d gpm is the one whose watts those are: %d gpm', (rpm, from, to) => {
    expect(flowAfter(rpm, from, change(rpm, from, to))).toBeCloseTo(to, 0);
  });

  it('agrees with a root of the power curve itself', () => {
    const watts = (wattsAt(curve, 3000, 45) ?? 0) - 100;
    const root = findRoot((gpm) => (wattsAt(curve, 3000, gpm) ?? Number.NaN) - watts, 0, 45);
    expect(flowAfter(3000, 45, -100)).toBeCloseTo(root ?? Number.NaN, 1);
  });

  it('is none where the watts fell to those of no flow', () => {
    expect(flowAfter(3450, 50, change(3450, 50, 0) - 5)).toBe(0);
  });

  it('cannot be told beyond the curve, at standstill, without a known flow, and for what is no number', () => {
    expect(flowAfter(3450, 500, -10)).toBeUndefined();
    expect(flowAfter(0, 50, -10)).toBeUndefined();
    expect(flowAfter(3450, 0, -10)).toBeUndefined();
    expect(flowAfter(3450, 50, 5000)).toBeUndefined();
    expect(flowAfter(3450, 50, Number.NaN)).toBeUndefined();
  });
});
