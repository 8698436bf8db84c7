import { expect, it } from 'vitest';
import { createFormat } from '#src/lib/format/create-format.ts';
import { labelRun } from '#src/lib/why/label-run.ts';
import { parseBecause } from '#src/lib/why/parse-because.ts';
import { whatComes } from '#src/lib/why/what-comes.ts';
import { createFakeFleet } from '#tests/src/fake-api/fake-fleet.ts';
import { FAKE_EVENING } from '#tests/src/fake-api/fake-state.ts';

const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const pump = createFakeFleet(FAKE_EVENING).find(({ detail }) => detail.padName === 'Saltern Way 12')!.detail;

it('reads a reason from the wire, and calls one it does not know unknown', () => {
  expect(parseBecause({ kind: 'input', input: 2, others: [1, 'x'] })).toEqual({ kind: 'input', input: 2, others: [1] });
  expect(parseBecause({ kind: 'fault', code: 7 })).toEqual({ kind: 'fault', code: undefined });
  expect(parseBecause({ kind: 'moonlight' })).toEqual({ kind: 'unknown' });
  expect(parseBecause({ kind: 'constructor' })).toEqual({ kind: 'unknown' });
});

it('names a run by what it does for the people there, shorter where there is less room', () => {
  expect(labelRun({ source: 'input', activeInput: 1 }, pump, format)).toEqual(['time clock 1: cleaner', 'cleaner']);
  expect(labelRun({ source: 'program', activeInput: 0 }, pump, format)).toEqual(['program']);
  expect(labelRun({ source: 'off', activeInput: 0 }, pump, format)).toEqual([]);
});

it('says what a pump’s clocks bring next, and nothing where nothing comes', () => {
  expect(whatComes(pump, FAKE_EVENING, format)).toBe('Tomorrow at 10 AM time clock 1 starts the cleaner.');
  expect(
    whatComes({ ...pump, inputs: [], settings: { ...pump.settings, program: [] } }, FAKE_EVENING, format),
  ).toBeUndefined();
});
