import { describe, expect, it } from 'vitest';
import { decodeStatus, encodeStatus } from '#shared/contract/mqtt/status.ts';

const CONNECTION = '7f3c1a52-5f3e-4a0e-9a53-0d4b8a2f6c11';
const BOOT = '0d4b8a2f-9a53-4a0e-5f3e-7f3c1a526c11';
const ONLINE = { state: 'online', conn: CONNECTION, boot: BOOT, up: 12, fw: '1.4.2' };

describe('decodeStatus', () => {
  it('reads the online message of the contract', () => {
    expect(decodeStatus(JSON.stringify({ ...ONLINE, unknown: 1 }))).toEqual({
      kind: 'status',
      status: { state: 'online', connection: CONNECTION, boot: BOOT, upSeconds: 12, firmware: '1.4.2' },
    });
  });

  it('reads the last will', () => {
    expect(decodeStatus(`{"state":"lost","conn":"${CONNECTION}"}`)).toEqual({
      kind: 'status',
      status: { state: 'lost', connection: CONNECTION },
    });
  });

  it.each([
    ['state', 'asleep', 'state-unknown'],
    ['conn', 'abc', 'conn-invalid'],
    ['boot', undefined, 'boot-invalid'],
    ['up', -1, 'up-invalid'],
    ['up', '12', 'up-invalid'],
    ['fw', 'x'.repeat(33), 'fw-invalid'],
    ['fw', '1.4\u0000', 'fw-invalid'],
  ])('refuses %s = %j as %s', (field, value, reason) => {
    expect(decodeStatus(JSON.stringify({ ...ONLINE, [field]: value }))).toEqual({ kind: 'refused', reason });
  });

  it.each([
    ['{', 'not-json'],
    ['[1]', 'not-an-object'],
  ])('refuses %s as %s', (text, reason) => {
    expect(decodeStatus(text)).toEqual({ kind: 'refused', reason });
  });

  it.each([
    { state: 'online', connection: CONNECTION, boot: BOOT, upSeconds: 0, firmware: '2.0' } as const,
    { state: 'lost', connection: CONNECTION } as const,
  ])('reads back what it wrote: $state', (status) => {
    expect(decodeStatus(encodeStatus(status))).toEqual({ kind: 'status', status });
  });
});
