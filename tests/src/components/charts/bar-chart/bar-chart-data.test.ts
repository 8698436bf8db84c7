import { describe, expect, it } from 'vitest';
import { inkOfPart, nameBars, stackParts } from '#src/components/charts/bar-chart/bar-chart-data.ts';

describe('bars in parts', () => {
  it('stand one on the other, in the order of the parts', () => {
    const parts = [
      { label: 'Peak', values: [1, null, null] },
      { label: 'Other', values: [2, 3, null] },
    ];
    expect(stackParts({ labels: ['a', 'b', 'c'], parts })).toEqual([
      [1, 0, null],
      [3, 3, null],
    ]);
  });

  it('have an ink each for the first six', () => {
    const inks = Array.from({ length: 6 }, (_, index) => JSON.stringify(inkOfPart(index)));
    expect(new Set(inks).size).toBe(6);
    expect(inkOfPart(6)).toEqual(inkOfPart(0));
  });

  it('are named as far as there is room', () => {
    expect(nameBars(5, 400, 64)).toEqual([0, 1, 2, 3, 4]);
    expect(nameBars(31, 320, 64)).toEqual([0, 7, 14, 21, 28]);
    expect(nameBars(3, 10, 64)).toEqual([0]);
  });
});
