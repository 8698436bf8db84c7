import { describe, expect, it } from 'vitest';
import { compareFilterPressure } from '#shared/domain/hydraulics/filter-pressure.ts';

const clean = [
  { rpm: 2850, psi: 14, at: 1 },
  { rpm: 2850, psi: 12, at: 2 },
  { rpm: 1700, psi: 4, at: 2 },
];

describe('filter pressure', () => {
  it('is held against the latest clean pressure at the same speed', () => {
    expect(compareFilterPressure(clean, { rpm: 2850, psi: 13 })).toMatchObject({
      kind: 'compared',
      cleanPsi: 12,
      risePsi: 1,
      verdict: 'clean',
    });
  });

  it('calls for cleaning at a quarter over clean, or 10 psi', () => {
    expect(compareFilterPressure(clean, { rpm: 2850, psi: 15 })).toMatchObject({ verdict: 'due', riseShare: 0.25 });
    expect(compareFilterPressure([{ rpm: 3450, psi: 45, at: 0 }], { rpm: 3450, psi: 55 })).toMatchObject({
      verdict: 'due',
    });
  });

  it('says when it stands well under clean: held up before the filter', () => {
    expect(compareFilterPressure(clean, { rpm: 2850, psi: 8 })).toMatchObject({ verdict: 'below-clean' });
  });

  it('never compares across speeds', () => {
    expect(compareFilterPressure(clean, { rpm: 2400, psi: 13 })).toEqual({
      kind: 'no-clean-pressure-at-this-speed',
      knownRpm: [1700, 2850],
    });
    expect(compareFilterPressure(clean, { rpm: 2890, psi: 13 }).kind).toBe('compared');
    expect(compareFilterPressure([], { rpm: 2890, psi: 13 })).toEqual({
      kind: 'no-clean-pressure-at-this-speed',
      knownRpm: [],
    });
  });

  it.each([
    [2850, Number.NaN, 'psi'],
    [2850, -1, 'psi'],
    [2850, 400, 'psi'],
    [0, 12, 'rpm'],
    [Number.NaN, 12, 'rpm'],
  ])('refuses %s rpm and %s psi by naming %s', (rpm, psi, field) => {
    expect(compareFilterPressure(clean, { rpm, psi })).toMatchObject({ kind: 'refused', field });
  });
});
