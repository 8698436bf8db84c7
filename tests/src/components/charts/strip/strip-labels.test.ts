import { describe, expect, it } from 'vitest';
import { placeLabels } from '#src/components/charts/strip/strip-labels.ts';
import { STRIP_METRICS } from '#src/components/charts/strip/strip-metrics.ts';
import type { StripRun } from '#src/components/charts/strip/strip-run.ts';
import { layoutStrip } from '#src/components/charts/strip/strip-view.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const HOUR = 3_600_000;
const WIDTH = 960;
const names = (run: StripRun): readonly string[] =>
  run.source === 'program'
    ? ['program']
    : run.source === 'input'
      ? [`time clock ${run.activeInput}: cleaner`, 'cleaner']
      : [];

const place = (runs: StripRun[], now = 24 * HOUR, measure = (text: string) => text.length * 7) => {
  const layout = layoutStrip(
    { runs, planned: [], window: { from: 0, until: 24 * HOUR }, now, tone: 'soon', topRpm: 3450 },
    WIDTH,
    STRIP_METRICS.home,
  );
  return placeLabels(layout, names, measure, WIDTH).map(({ text, x }) => [text, x]);
};
const run = (from: number, to: number, change: Partial<StripRun> = {}) =>
  makeRun({ from: from * HOUR, to: to * HOUR, meanRpm: 1400, ...change });
const clock = (from: number, to: number, closedInputs = 1) =>
  run(from, to, { source: 'input', activeInput: 1, closedInputs, meanRpm: 2850 });

describe('words above the runs', () => {
  it('name each thing once, at its widest stretch', () => {
    expect(place([run(4, 10), clock(10, 15), run(15, 20)])).toEqual([
      ['program', 4 * 40 + 6],
      ['time clock 1: cleaner', 10 * 40 + 6],
    ]);
  });

  it('take two blocks of one input as one, though a second input closes within it', () => {
    expect(place([clock(10, 12), clock(12, 15, 0b11)])).toEqual([['time clock 1: cleaner', 406]]);
  });

  it('never cover a taller neighbour, the now line or the edge: shorter words are tried, then none', () => {
    expect(place([run(8, 9), clock(9, 12)])).toEqual([['time clock 1: cleaner', 366]]);
    expect(place([clock(21, 22)])).toEqual([['cleaner', 846]]);
    expect(place([clock(10, 12)], 13 * HOUR)).toEqual([['cleaner', 406]]);
    expect(place([clock(10, 12)], 12 * HOUR, () => 500)).toEqual([]);
  });
});
