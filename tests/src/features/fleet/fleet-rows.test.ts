import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { type FleetPages, patchRows } from '#src/features/fleet/fleet-socket.ts';
import { isElsewhere, viewRow } from '#src/features/fleet/row-view.ts';
import { settleOrder } from '#src/features/fleet/settle-order.ts';
import { createFormat } from '#src/lib/format/create-format.ts';
import { createFakeFleet } from '#tests/src/fake-api/fake-fleet.ts';
import { FAKE_EVENING } from '#tests/src/fake-api/fake-state.ts';

const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const fleet = createFakeFleet(FAKE_EVENING);
const rowOf = (serial: string): PumpRow => {
  const pump = fleet.find(({ detail }) => detail.serial === serial);
  if (pump === undefined) throw new Error(`no ${serial}`);
  return pump.detail;
};
const view = (row: PumpRow) => viewRow(row, format, FAKE_EVENING);

describe('a row', () => {
  it('says what is wrong, with the evidence’s numbers', () => {
    expect(view(rowOf('MR-000101'))).toMatchObject({
      mark: 'urgent',
      acknowledged: false,
      line: 'Did not prime, 3 tries',
    });
    expect(view(rowOf('MR-000103'))).toMatchObject({
      mark: 'soon',
      acknowledged: true,
      line: 'Flow down 41 %, dirty filter?',
    });
  });

  it('says how many more alarms there are', () => {
    const row = rowOf('MR-000101');
    expect(view({ ...row, alarm: row.alarm && { ...row.alarm, open: 3 } }).line).toBe(
      'Did not prime, 3 tries, and 2 more',
    );
  });

  it('says why a healthy pump runs as it does, without a mark', () => {
    const healthy = fleet.find(
      ({ detail }) => detail.alarm === null && (detail.now?.rpm ?? 0) > 40 && detail.now?.source === 'program',
    );
    expect(view(healthy!.detail)).toMatchObject({ mark: undefined, line: expect.stringMatching(/program until/) });
  });

  it('shows no figures of a pump that is not heard', () => {
    const silent = { ...rowOf('MR-000104'), alarm: null };
    expect(view(silent)).toMatchObject({ mark: 'silent', rpm: '–', watts: '–', line: 'Silent since 9:18\u00a0AM' });
  });

  it('says when nothing watches the pump, or nothing has been heard yet', () => {
    const row = { ...rowOf('MR-000104'), alarm: null, silentSince: null, now: null };
    expect(view(row).line).toBe('Waiting for its first reading');
    expect(view({ ...row, serial: null }).line).toBe('No device fitted yet');
  });

  it('names a pad’s state where it is not the usual one', () => {
    const row = fleet.find(({ detail }) => detail.padState === 'reduced')!.detail;
    expect(view(row).line).toMatch(/^Reduced for winter · /);
  });

  it('is elsewhere only where the clocks show another time now', () => {
    const zoned = (zone: string) => isElsewhere({ zone }, 'America/Los_Angeles', FAKE_EVENING);
    expect([zoned('America/Los_Angeles'), zoned('America/Denver'), zoned('America/Tijuana')]).toEqual([
      false,
      true,
      false,
    ]);
  });
});

describe('news of pumps', () => {
  const pages = (rows: readonly PumpRow[][]): FleetPages => ({
    pages: rows.map((items) => ({
      items,
      nextCursor: null,
      totals: { pumps: 0, running: 0, idle: 0, urgent: 0, soon: 0, note: 0, silent: 0 },
      matching: 0,
      areas: [],
      serverNow: 0,
    })),
    pageParams: rows.map(() => undefined),
  });
  const [first, second] = [fleet[0]!.detail, fleet[1]!.detail];

  it('change their rows in place and leave every other object as it was', () => {
    const before = pages([[first], [second]]);
    const after = patchRows(
      before,
      new Map([[second.pumpId, { pumpId: second.pumpId, now: null, heardAt: 5, silentSince: 5, alarm: null }]]),
    );
    expect(after.pages[1]?.items[0]).toMatchObject({ padName: second.padName, heardAt: 5 });
    expect(after.pages[0]).toBe(before.pages[0]);
  });

  it('change nothing when they are of pumps that are not shown', () => {
    const before = pages([[first]]);
    expect(
      patchRows(
        before,
        new Map([['another', { pumpId: 'another', now: null, heardAt: 5, silentSince: null, alarm: null }]]),
      ),
    ).toBe(before);
  });
});

describe('the order under a pointer', () => {
  const rows = (ids: string) => [...ids].map((id) => ({ id }));
  const settle = (held: string, now: string) => settleOrder([...held], rows(now), ({ id }) => id);

  it('stands still; what is new comes last and what is gone leaves', () => {
    expect(
      settle('abc', 'cxab')
        .rows.map(({ id }) => id)
        .join(''),
    ).toBe('abcx');
    expect(
      settle('abc', 'ca')
        .rows.map(({ id }) => id)
        .join(''),
    ).toBe('ac');
  });

  it('says when there is a truer one', () => {
    expect(settle('abc', 'abc').moved).toBe(false);
    expect(settle('abc', 'acb').moved).toBe(true);
    expect(settle('abc', 'abcd').moved).toBe(false);
  });

  it('never loses or doubles a row', () => {
    const ids = fc.uniqueArray(fc.string({ minLength: 1, maxLength: 3 }), { maxLength: 20 });
    fc.assert(
      fc.property(ids, ids, (held, now) => {
        const settled = settleOrder(
          held,
          now.map((id) => ({ id })),
          ({ id }) => id,
        ).rows.map(({ id }) => id);
        return [...settled].sort().join('|') === [...now].sort().join('|');
      }),
    );
  });
});
