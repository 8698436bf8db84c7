import { describe, expect, it } from 'vitest';
import { readPadFile } from '#shared/contract/backtest/pad-file.ts';

const SETTINGS = {
  inputs: [2850, 2400, null],
  program: [{ days: '1111111', from: '06:00', to: '20:00', rpm: 1700 }],
  prime: { rpm: 3450, s: 300 },
};
const PAD = { serial: 'MR-000123', timezone: 'America/Phoenix', settings: SETTINGS };

describe('the pads file', () => {
  it('wants no more than serial, time zone and settings', () => {
    expect(readPadFile([PAD])?.pads[0]).toMatchObject({ pumpId: 'MR-000123', padState: 'open', intervalSeconds: 10 });
  });

  it('takes null for a missing field, and for what is off in the settings', () => {
    const nulls = {
      area: null,
      inputs: null,
      equipment: [{ kind: 'heater', input: 2, minGpm: null, interlock: null }],
    };
    const settings = { ...SETTINGS, prime: null, freeze: null, max: null, min: null };
    const file = readPadFile([{ ...PAD, ...nulls, model: null, nominalV: null, settings }]);
    expect(file?.faults).toEqual([]);
    expect(file?.pads[0]?.settings).toMatchObject({
      prime: null,
      freeze: null,
      maxRpm: 3450,
      inputs: [2850, 2400, null],
    });
    expect(file?.pads[0]?.equipment).toMatchObject([{ kind: 'heater', input: 2, interlock: 'unknown' }]);
  });

  it('names one bad pad and keeps the others', () => {
    const bad = { ...PAD, serial: 'MR-000124', settings: { ...SETTINGS, inputs: ['fast'] } };
    const file = readPadFile([bad, PAD, { ...PAD }]);
    expect(file?.pads.map(({ pumpId }) => pumpId)).toEqual(['MR-000123']);
    expect(file?.faults).toMatchObject([
      { index: 0, serial: 'MR-000124', message: 'settings.inputs: rpm-out-of-range' },
      { index: 2, serial: 'MR-000123', message: 'serial: stands twice' },
    ]);
  });

  it('is an array or nothing', () => {
    expect(readPadFile({ pads: [PAD] })).toBeUndefined();
  });
});
