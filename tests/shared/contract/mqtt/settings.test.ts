import { describe, expect, it } from 'vitest';
import { decodeSettings, encodeSettings } from '#shared/contract/mqtt/settings.ts';

const EVERY_DAY = Array.from({ length: 7 }, () => true);
const WIRE = {
  inputs: [2850, 2400, null],
  program: [{ days: '1111111', from: '06:00', to: '20:00', rpm: 1700 }],
  prime: { rpm: 3450, s: 300 },
  timed: { rpm: 3200, min: 45 },
  freeze: { c: 4.4, rpm: 1150 },
  max: 3450,
  min: 600,
};
const SETTINGS = {
  inputs: [2850, 2400, null],
  program: [{ days: EVERY_DAY, fromMinute: 360, toMinute: 1200, rpm: 1700 }],
  prime: { rpm: 3450, seconds: 300 },
  timed: { rpm: 3200, minutes: 45 },
  freeze: { celsius: 4.4, rpm: 1150 },
  maxRpm: 3450,
  minRpm: 600,
};

describe('decodeSettings', () => {
  it('reads the message of the contract', () => {
    expect(decodeSettings(JSON.stringify(WIRE))).toEqual({ kind: 'settings', settings: SETTINGS, faults: [] });
  });

  it('writes it back as it came', () => {
    expect(JSON.parse(encodeSettings(SETTINGS))).toEqual(WIRE);
  });

  it('takes null for what is not used, and leaves out what is not said', () => {
    const decoded = decodeSettings('{"prime":null,"timed":null,"freeze":null,"inputs":[null]}');

    expect(decoded).toEqual({
      kind: 'settings',
      settings: { prime: null, timed: null, freeze: null, inputs: [null] },
      faults: [],
    });
  });

  it.each([
    ['inputs', [2850, 0], 'rpm-out-of-range'],
    ['inputs', [], 'not-a-list-of-1-to-8'],
    ['inputs', Array.from({ length: 9 }, () => 1000), 'not-a-list-of-1-to-8'],
    ['program', 'none', 'not-a-list'],
    ['program', Array.from({ length: 65 }, () => WIRE.program[0]), 'too-many-entries'],
    ['prime', { rpm: 3450, s: 0 }, 's-out-of-range'],
    ['prime', 300, 'not-an-object'],
    ['timed', { rpm: 9000, min: 45 }, 'rpm-out-of-range'],
    ['freeze', { c: 'cold', rpm: 1150 }, 'c-out-of-range'],
    ['max', null, 'rpm-out-of-range'],
    ['min', 0, 'rpm-out-of-range'],
  ])('drops %s = %j alone as %s', (field, value, reason) => {
    const decoded = decodeSettings(JSON.stringify({ ...WIRE, [field]: value }));
    const rest = decodeSettings(JSON.stringify({ ...WIRE, [field]: undefined }));

    expect(decoded).toMatchObject({ kind: 'settings', faults: [{ field, reason }] });
    expect(decoded).toMatchObject({ settings: rest.kind === 'settings' ? rest.settings : {} });
    expect(Object.keys(decoded.kind === 'settings' ? decoded.settings : {})).toHaveLength(6);
  });

  it.each([
    [{ from: '06:00', to: '06:00' }, 'no-length'],
    [{ from: '24:00' }, 'from-invalid'],
    [{ from: '6:00' }, 'from-invalid'],
    [{ to: '20:60' }, 'to-invalid'],
    [{ days: '111' }, 'days-invalid'],
    [{ rpm: -1700 }, 'rpm-out-of-range'],
  ])('refuses the program entry %j alone as %s', (change, reason) => {
    const bad = { ...WIRE.program[0], ...change };
    const decoded = decodeSettings(JSON.stringify({ program: [bad, ...WIRE.program] }));

    expect(decoded).toEqual({
      kind: 'settings',
      settings: { program: SETTINGS.program },
      faults: [{ field: 'program', index: 0, reason }],
    });
  });

  it.each([
    ['00:00', '24:00', 0, 1440],
    ['18:00', '00:00', 1080, 1440],
    ['22:00', '02:00', 1320, 120],
  ])('reads an entry from %s to %s', (from, to, fromMinute, toMinute) => {
    const decoded = decodeSettings(JSON.stringify({ program: [{ ...WIRE.program[0], from, to }] }));

    expect(decoded).toMatchObject({ settings: { program: [{ fromMinute, toMinute }] }, faults: [] });
  });

  it.each([
    ['nope', 'not-json'],
    ['[]', 'not-an-object'],
  ])('refuses %s as %s', (text, reason) => {
    expect(decodeSettings(text)).toEqual({ kind: 'refused', reason });
  });
});
