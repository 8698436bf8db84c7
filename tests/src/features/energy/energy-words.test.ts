import { describe, expect, it } from 'vitest';
import type { Saved } from '#shared/contract/http/energy-figures.ts';
import {
  changeOf,
  changeText,
  kwhText,
  perVolumeText,
  shareText,
  waterWords,
} from '#src/features/energy/energy-view.ts';
import { costCell, turnoverLine, waterCell } from '#src/features/energy/home-words.ts';
import { dearLine, spellMonths } from '#src/features/energy/program-view.ts';
import { savedLine, savedMethod } from '#src/features/energy/saved-view.ts';
import { isEveryDay } from '#src/features/energy/week-strip.tsx';
import { createFormat } from '#src/lib/format/create-format.ts';
import { fakePumpEnergy } from '#tests/src/fake-api/fake-energy.ts';
import { createFakeState } from '#tests/src/fake-api/fake-state.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const us = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const si = createFormat({ locale: 'en-US', preferences: { units: 'si', clock: 'locale' } });
const HOUR = 3_600_000;

describe('figures', () => {
  it('keep three figures of energy', () => {
    expect([1.634, 10.24, 336.4].map((kwh) => kwhText(kwh, us))).toEqual(['1.63 kWh', '10.2 kWh', '336 kWh']);
  });

  it('never round what is short of everything to everything', () => {
    expect([0, 0.034, 0.5, 0.9999, 1].map((share) => shareText(share, us))).toEqual([
      '0 %',
      '3.4 %',
      '50 %',
      '99.9 %',
      '100 %',
    ]);
  });

  it('give energy a volume in the reader’s units', () => {
    // 1,000 US gal = 3.785412 m³ (facts, section 3.1: 1 gal = 3.785412 L).
    expect(perVolumeText(0.38, us)).toBe('0.38');
    expect(perVolumeText(3.785412, si)).toBe('1.00');
    expect(perVolumeText(null, us)).toBe('–');
  });

  it('compare with a month before only where there is one', () => {
    expect(changeText(changeOf(110, 100), us)).toBe('+10 %');
    expect(changeText(changeOf(95, 100), us)).toBe('−5.0 %');
    expect(changeText(changeOf(95, null), us)).toBe('new');
  });
});

describe('water', () => {
  it('says how sure it is, and that it is the least where part is not known', () => {
    expect(waterWords({ gallons: 26_000, sigmaGallons: 2_100, unknownSeconds: 0 }, us)).toEqual({
      figure: '26,000 gal',
      sure: '± 2,100 gal',
    });
    expect(waterWords({ gallons: 26_000, sigmaGallons: null, unknownSeconds: 3600 }, us).sure).toBe(
      'its uncertainty is not known; for 1 h the watts could not tell the flow',
    );
    expect(waterWords({ gallons: 1000, sigmaGallons: 100, unknownSeconds: 0 }, si).figure).toBe('3.8 m³');
  });

  it('is not zero where the readings cannot tell', () => {
    expect(waterWords({ gallons: 0, sigmaGallons: null, unknownSeconds: 7200 }, us).figure).toBe('cannot tell');
    expect(waterWords(null, us).figure).toBe('cannot tell');
  });
});

const saved: Saved = {
  baselineKwh: 980,
  actualKwh: 320,
  savedKwh: 660,
  sigmaKwh: 55,
  saved: '181.50',
  sigma: '15.10',
  method: 'A',
  stipulated: ['baseline-hours', 'baseline-watts'],
  coverage: 0.97,
  baseline: { kind: 'nameplate', basis: 'same-hours', watts: 1650, sigmaWatts: 247 },
  carbon: null,
};

describe('savings', () => {
  it('state amount, uncertainty, both sides, and that a plate is a guess', () => {
    expect(savedLine(saved, 'USD', us)).toBe('$181.50 ± $15.10: 320 kWh instead of 980 kWh.');
    const method = savedMethod(saved, us).join(' ');
    expect(method).toContain('a guess, with 15 % as one standard deviation');
    expect(method).toContain('IPMVP option A: something is stipulated (how long it ran, what the old motor drew).');
  });

  it('are told in energy where no money is shown, and as a loss where it is one', () => {
    expect(savedLine({ ...saved, saved: null, sigma: null }, null, us)).toBe(
      '660 kWh ± 55.0 kWh: 320 kWh instead of 980 kWh.',
    );
    expect(savedLine({ ...saved, savedKwh: -20, saved: '-5.50' }, 'USD', us)).toMatch(
      /^It cost more than before, by \$5\.50 ± /,
    );
  });

  it('say so when the difference drowns in what is uncertain', () => {
    expect(savedMethod({ ...saved, savedKwh: 20 }, us).at(-1)).toBe('The difference is within what is uncertain.');
    expect(savedMethod(saved, us).at(-1)).not.toBe('The difference is within what is uncertain.');
  });
});

describe('for a homeowner', () => {
  const state = createFakeState({ role: 'homeowner' });
  const energyBy = (by: 'day' | 'month', money = true) =>
    fakePumpEnergy({ ...state, energy: { money } }, state.pumps[2]!, { from: '2026-11-01', until: '2026-12-02', by });
  const days = energyBy('day');
  const today = days.spans.at(-1)!;

  it('water is times round the pool, or plainly not known', () => {
    expect(waterCell(today, 24_000, us)).toEqual({ figure: '1.08', beside: 'times your 24,000 gal pool', lines: [] });
    const some = { ...today, water: { gallons: 26_000, sigmaGallons: null, unknownSeconds: 3600 } };
    expect(waterCell(some, 24_000, us).figure).toBe('at least 1.08');
    expect(waterCell({ ...today, water: null }, 24_000, us).figure).toBe('cannot tell');
    expect(waterCell(undefined, 24_000, us).figure).toBe('cannot tell');
    expect(waterCell({ ...today, turnovers: null }, null, us).beside).toContain('your pool’s volume is not recorded');
  });

  it('a turnover is done when the water of the runs says so', () => {
    const from = Date.UTC(2026, 11, 1, 8);
    const runs = [
      makeRun({ from, to: from + 2 * HOUR, gallons: 10_000 }),
      makeRun({ from: from + 2 * HOUR, to: from + 6 * HOUR, gallons: 20_000 }),
    ];
    const asked = { runs, from, now: from + 8 * HOUR, poolGallons: 20_000, zone: 'America/Los_Angeles' };
    expect(turnoverLine(asked, us)).toBe('One full turnover was done by 4\u00a0AM.');
    expect(turnoverLine({ ...asked, poolGallons: 40_000 }, us)).toBe('One full turnover is still to come today.');
    const unknown = runs.map((run) => ({ ...run, gallons: null }));
    expect(turnoverLine({ ...asked, runs: unknown }, us)).toBeUndefined();
    expect(turnoverLine({ ...asked, poolGallons: null }, us)).toBeUndefined();
  });

  it('cost is today’s and the months’, or energy alone without a tariff', () => {
    const cell = costCell({ ...today, label: '2026-12-02' }, days, energyBy('month'), us);
    expect(cell.figure).toMatch(/^\$\d+\.\d\d$/);
    expect(cell.lines[0]).toMatch(/^December 2026 so far: \$/);
    expect(cell.lines[1]).toMatch(/^November 2026 came to \$/);
    // On the first of a month "so far" would say today's figure a second time.
    const first = costCell({ ...today, label: '2026-12-01' }, days, energyBy('month'), us);
    expect(first.lines[0]).toMatch(/^November 2026 came to \$/);
    const plain = costCell({ ...today, cost: null }, energyBy('day', false), energyBy('month', false), us);
    expect(plain.figure).toMatch(/kWh$/);
    expect(plain.lines.at(-1)).toBe('What a kWh costs you is not recorded, so only the energy is shown.');
    expect(costCell(undefined, days, undefined, us).lines[0]).toBe('Nothing was read today.');
  });
});

describe('programs', () => {
  it('name months in a row as one stretch', () => {
    expect(spellMonths([5, 6, 7, 11], 'en-US')).toBe('Jun–Aug, Dec');
    expect(spellMonths([3], 'en-US')).toBe('Apr');
  });

  it('say when something runs at a dear price, and that it does all year', () => {
    const dear = (months: readonly number[]) => ({
      caller: { kind: 'clock' as const, input: 1 },
      months: months.map((month) => ({ month, minutesPerWeek: 60, extraPerWeek: '1.00' })),
      extraPerYear: '52.00',
    });
    expect(dearLine(dear([5, 6, 7]), 'USD', us)).toContain(' at a dear price in Jun–Aug: $52.00 a year');
    expect(dearLine(dear([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11]), 'USD', us)).toContain(' at a dear price all year: ');
  });

  it('show one day where all days are alike, also over midnight', () => {
    const day = 86_400_000;
    const run = (from: number, to: number, rpm = 1500) =>
      ({ from, to, source: 'program', closedInputs: 0, activeInput: 0, rpm }) as const;
    const alike = Array.from({ length: 7 }, (_, index) => run(index * day + 8 * HOUR, index * day + 20 * HOUR));
    expect(isEveryDay(alike)).toBe(true);
    expect(isEveryDay([...alike.slice(0, 6), run(6 * day + 9 * HOUR, 6 * day + 20 * HOUR)])).toBe(false);
    expect(isEveryDay([run(0, 7 * day)])).toBe(true);
  });
});
