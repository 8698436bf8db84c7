import { describe, expect, it } from 'vitest';
import type { MotorSettings } from '#shared/domain/control/motor-settings.ts';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { ClockWindow } from '#shared/domain/control/pump-context.ts';
import { type InputWindow, listInputSpans, recordedWindows } from '#shared/domain/control/window-spans.ts';
import { EVERY_DAY, minute, SETTINGS, wall } from './invented-pump.ts';

const PHOENIX = 'America/Phoenix';
const day = (text: string): number => wall(PHOENIX, `2025-07-01 ${text}`);
const NEXT_DAY = wall(PHOENIX, '2025-07-02 00:00');

function window(on: string, off: string, more: Partial<ClockWindow> = {}): ClockWindow {
  return { days: EVERY_DAY, onMinute: minute(on), offMinute: minute(off), opensEarlyMinutes: 0, ...more };
}

function planned(
  from: number,
  to: number,
  windows: readonly InputWindow[] = [],
  settings: Partial<MotorSettings> = {},
): unknown[] {
  const where = { zone: PHOENIX, motorClockOffsetMinutes: 0 };
  const runs = plan({ ...SETTINGS, ...settings }, DEFAULT_TRAITS, where, from, to, windows);
  return runs.map((run) => [
    new Date(run.from - 7 * 3_600_000).toISOString().slice(11, 16),
    run.source,
    run.rpm,
    run.activeInput,
  ]);
}

describe('the plan', () => {
  it('holds off, prime and program, and the inputs in their windows', () => {
    const windows = [
      { input: 1, window: window('10:00', '14:00', { opensEarlyMinutes: 20 }) },
      { input: 2, window: window('13:00', '16:00') },
    ];
    expect(planned(day('00:00'), NEXT_DAY, windows)).toEqual([
      ['00:00', 'off', 0, 0],
      ['06:00', 'prime', 3450, 0],
      ['06:05', 'program', 1700, 0],
      ['10:00', 'input', 2850, 1],
      ['13:00', 'input', 2850, 1],
      ['13:40', 'input', 2400, 2],
      ['16:00', 'program', 1700, 0],
      ['20:00', 'off', 0, 0],
    ]);
  });

  it('primes again at every start, also one by a clock at night', () => {
    expect(planned(day('19:00'), NEXT_DAY, [{ input: 2, window: window('22:00', '23:00') }])).toEqual([
      ['19:00', 'program', 1700, 0],
      ['20:00', 'off', 0, 0],
      ['22:00', 'prime', 3450, 2],
      ['22:05', 'input', 2400, 2],
      ['23:00', 'off', 0, 0],
    ]);
  });

  it('that begins within a prime holds its rest, and after one none of it', () => {
    expect(planned(day('06:02'), day('06:10'))).toEqual([
      ['06:02', 'prime', 3450, 0],
      ['06:05', 'program', 1700, 0],
    ]);
    expect(planned(day('06:05'), day('06:10'))).toEqual([['06:05', 'program', 1700, 0]]);
  });

  it('follows windows past midnight and leaves out inputs that are not used', () => {
    const windows = [
      { input: 1, window: window('22:00', '02:00') },
      { input: 3, window: window('12:00', '13:00') },
    ];
    expect(planned(day('00:00'), day('03:00'), windows, { prime: null, program: [] })).toEqual([
      ['00:00', 'input', 2850, 1],
      ['02:00', 'off', 0, 0],
    ]);
  });

  it('goes on for weeks, day by day', () => {
    const runs = planned(day('00:00'), day('00:00') + 28 * 86_400_000);
    expect(runs.filter((run) => Array.isArray(run) && run[1] === 'prime')).toHaveLength(28);
  });

  it('is empty where the stretch is', () => {
    expect(planned(day('06:00'), day('06:00'))).toEqual([]);
    expect(planned(Number.NaN, day('06:00'))).toEqual([]);
  });
});

describe('when a clock’s contact is closed', () => {
  it('is from the on tripper to some minutes before the off tripper', () => {
    const windows = recordedWindows([
      { number: 2, kind: 'clock', windows: [window('10:00', '14:00', { opensEarlyMinutes: 20 })] },
    ]);
    expect(listInputSpans(PHOENIX, windows, day('00:00'), NEXT_DAY)).toEqual([
      { input: 2, from: day('10:00'), to: day('13:40') },
    ]);
  });

  it('is never where the switch opens before it closed, nor in an unknown zone', () => {
    const windows = [{ input: 1, window: window('10:00', '10:20', { opensEarlyMinutes: 20 }) }];
    expect(listInputSpans(PHOENIX, windows, day('00:00'), NEXT_DAY)).toEqual([]);
    expect(
      listInputSpans('Mars/Olympus', [{ input: 1, window: window('10:00', '14:00') }], day('00:00'), NEXT_DAY),
    ).toEqual([]);
  });

  it('is on the days of the on tripper only', () => {
    const mondays = window('23:00', '01:00', { days: [true, false, false, false, false, false, false] });
    const spans = listInputSpans(PHOENIX, [{ input: 1, window: mondays }], day('00:00'), NEXT_DAY);
    expect(spans).toEqual([{ input: 1, from: wall(PHOENIX, '2025-06-30 23:00'), to: day('01:00') }]);
  });

  it('counts a wall time skipped by daylight saving as the shift', () => {
    const zone = 'America/New_York';
    const from = wall(zone, '2025-03-09 00:00');
    const spans = listInputSpans(zone, [{ input: 1, window: window('02:30', '04:00') }], from, from + 20 * 3_600_000);
    expect(spans).toEqual([
      { input: 1, from: Date.parse('2025-03-09T07:00:00Z'), to: Date.parse('2025-03-09T08:00:00Z') },
    ]);
  });
});
