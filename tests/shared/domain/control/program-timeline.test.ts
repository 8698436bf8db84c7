import { describe, expect, it } from 'vitest';
import type { ProgramEntry } from '#shared/domain/control/motor-settings.ts';
import { findSlotIndex, programTimeline } from '#shared/domain/control/program-timeline.ts';
import { entry, wall } from './invented-pump.ts';

const BERLIN = 'Europe/Berlin';
const SYDNEY = 'Australia/Sydney';

/** What runs from one wall time to another, as `rpm for minutes`, off stretches left out. */
function runsOf(zone: string, program: readonly ProgramEntry[], from: string, to: string, offset = 0): string[] {
  const [start, end] = [wall(zone, from), wall(zone, to)];
  const { slots } = programTimeline(program, 'first-listed', zone, offset, start);
  return slots
    .filter((slot) => slot.entry >= 0 && slot.to > start && slot.from < end)
    .map((slot) => `${slot.rpm} for ${(Math.min(slot.to, end) - Math.max(slot.from, start)) / 60_000}`);
}

function rpmAt(
  program: readonly ProgramEntry[],
  text: string,
  overlap: 'first-listed' | 'higher-speed' = 'first-listed',
  offset = 0,
) {
  const at = wall('America/Phoenix', text);
  const timeline = programTimeline(program, overlap, 'America/Phoenix', offset, at);
  return timeline.slots[findSlotIndex(timeline, at)]?.rpm;
}

describe('a program in instants', () => {
  const days = [true, false, false, false, false, false, false];

  it('is half-open: it runs at its beginning and no more at its end', () => {
    const program = [entry('06:00', '20:00', 1700)];
    expect(rpmAt(program, '2025-07-01 05:59:59')).toBe(0);
    expect(rpmAt(program, '2025-07-01 06:00')).toBe(1700);
    expect(rpmAt(program, '2025-07-01 19:59:59')).toBe(1700);
    expect(rpmAt(program, '2025-07-01 20:00')).toBe(0);
  });

  it('takes the day of the beginning, also past midnight', () => {
    // 2025-06-30 is a Monday.
    const program = [entry('22:00', '04:00', 1400, days)];
    expect(rpmAt(program, '2025-06-30 21:59')).toBe(0);
    expect(rpmAt(program, '2025-06-30 23:00')).toBe(1400);
    expect(rpmAt(program, '2025-07-01 03:59')).toBe(1400);
    expect(rpmAt(program, '2025-07-01 04:00')).toBe(0);
    expect(rpmAt(program, '2025-07-01 23:00')).toBe(0);
  });

  it('knows 24:00 as the end of the same day', () => {
    const program = [entry('18:00', '24:00', 1400, days)];
    expect(rpmAt(program, '2025-06-30 23:59')).toBe(1400);
    expect(rpmAt(program, '2025-07-01 00:00')).toBe(0);
  });

  it('takes the first listed of two that overlap, or the faster where the model says so', () => {
    const program = [entry('06:00', '12:00', 1400), entry('08:00', '10:00', 2600), entry('09:00', '14:00', 1200)];
    expect(rpmAt(program, '2025-07-01 08:30')).toBe(1400);
    expect(rpmAt(program, '2025-07-01 08:30', 'higher-speed')).toBe(2600);
    expect(rpmAt(program, '2025-07-01 11:00', 'higher-speed')).toBe(1400);
    expect(rpmAt(program, '2025-07-01 13:00')).toBe(1200);
  });

  it('goes by the motor’s clock: one that is ahead starts and ends sooner', () => {
    const program = [entry('06:00', '20:00', 1700, days)];
    expect(rpmAt(program, '2025-06-30 05:30', 'first-listed', 30)).toBe(1700);
    expect(rpmAt(program, '2025-06-30 19:30', 'first-listed', 30)).toBe(0);
    // Nine hours behind, Monday's evening is still running on Tuesday at the pad.
    expect(rpmAt(program, '2025-07-01 04:59', 'first-listed', -540)).toBe(1700);
    expect(rpmAt(program, '2025-06-30 06:00', 'first-listed', -540)).toBe(0);
  });

  it('gives no run to an entry without length, and none to one without days', () => {
    const never = [entry('06:00', '06:00', 1700), entry('08:00', '09:00', 1700, Array(7).fill(false))];
    expect(rpmAt(never, '2025-07-01 06:00')).toBe(0);
    expect(rpmAt(never, '2025-07-01 08:30')).toBe(0);
  });

  it('lies without a gap around the instant asked for, also in an unknown zone, which is read as UTC', () => {
    const at = Date.UTC(2025, 6, 1, 7);
    const { slots, from, to, freshUntil } = programTimeline(
      [entry('06:00', '20:00', 1700)],
      'first-listed',
      'Mars/Olympus',
      0,
      at,
    );
    expect(slots[0]?.from).toBe(from);
    expect(slots.at(-1)?.to).toBe(to);
    for (const [index, slot] of slots.entries()) if (index > 0) expect(slot.from).toBe(slots[index - 1]?.to);
    expect(slots.find((slot) => slot.from <= at && at < slot.to)?.rpm).toBe(1700);
    expect(freshUntil).toBe(Date.UTC(2025, 6, 2));
    expect(findSlotIndex({ slots, from, to, freshUntil }, to)).toBe(-1);
  });
});

describe('a program on the day the clocks go forward', () => {
  const cases: [string, string][] = [
    [BERLIN, '2025-03-30'],
    [SYDNEY, '2025-10-05'],
  ];

  it.each(cases)('in %s loses the hour: an entry across it is an hour shorter', (zone, date) => {
    expect(runsOf(zone, [entry('01:00', '05:00', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 180']);
  });

  it.each(cases)('in %s does not run an entry wholly inside the skipped hour', (zone, date) => {
    expect(runsOf(zone, [entry('02:10', '02:50', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual([]);
  });

  it.each(cases)('in %s begins an entry at the shift whose time was skipped', (zone, date) => {
    expect(runsOf(zone, [entry('02:30', '04:00', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 60']);
  });

  it.each(cases)('in %s ends an entry at the shift whose end was skipped', (zone, date) => {
    expect(runsOf(zone, [entry('01:00', '02:30', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 60']);
  });
});

describe('a program on the day the clocks go back', () => {
  const cases: [string, string][] = [
    [BERLIN, '2025-10-26'],
    [SYDNEY, '2025-04-06'],
  ];

  it.each(cases)('in %s gains the hour: an entry across it is an hour longer', (zone, date) => {
    expect(runsOf(zone, [entry('01:00', '05:00', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 300']);
  });

  it.each(cases)('in %s runs an entry inside the doubled hour once, at its first occurrence', (zone, date) => {
    const program = [entry('02:10', '02:50', 1700)];
    expect(runsOf(zone, program, `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 40']);
    const first = wall(zone, `${date} 02:10`);
    expect(programTimeline(program, 'first-listed', zone, 0, first).slots.some((slot) => slot.from === first)).toBe(
      true,
    );
  });

  it.each(cases)('in %s ends an entry for good at the first occurrence of its end', (zone, date) => {
    expect(runsOf(zone, [entry('22:00', '02:30', 1700)], `${date} 00:00`, `${date} 12:00`)).toEqual(['1700 for 150']);
  });

  it('shifts with a motor clock that was not set back: its hour is another', () => {
    // The motor still shows summer time, an hour ahead: its 05:00 comes at 04:00 on the wall.
    expect(runsOf(BERLIN, [entry('05:00', '06:00', 1700)], '2025-10-26 03:30', '2025-10-26 04:30', 60)).toEqual([
      '1700 for 30',
    ]);
  });
});
