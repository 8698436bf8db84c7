import { describe, expect, it } from 'vitest';
import { withSilence } from '#src/components/charts/strip/with-silence.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const runs = [makeRun({ from: 0, to: 10 }), makeRun({ from: 10, to: null })];
const spans = (list: ReturnType<typeof withSilence>) => list?.map(({ from, to, source }) => [from, to, source]);

describe('a pump that has gone silent', () => {
  it('is not said to run on: what follows the last word is no data', () => {
    expect(spans(withSilence(runs, 50))).toEqual([
      [0, 10, 'program'],
      [10, 50, 'program'],
      [50, null, 'no-data'],
    ]);
  });

  it('keeps a gap that is known already', () => {
    const known = [makeRun({ from: 0, to: 10 }), makeRun({ from: 10, to: null, source: 'no-data' })];
    expect(withSilence(known, 10)).toBe(known);
  });
});

it('leaves a pump that is heard as it is, nothing as nothing, and what has not come as not come', () => {
  expect(withSilence(runs, null)).toBe(runs);
  expect(withSilence([], 50)).toEqual([]);
  expect(withSilence(undefined, 50)).toBeUndefined();
});
