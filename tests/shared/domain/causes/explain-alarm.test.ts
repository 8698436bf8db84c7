import { expect, it } from 'vitest';
import { explainAlarm } from '#shared/domain/causes/explain-alarm.ts';

/** Daylight saving ended in New York on 1 November 2026, at 6:00 UTC (tz database). */
const SHIFT = Date.UTC(2026, 10, 1, 6);
const DAY = 86_400_000;
const clock = (from: number, zone: string) =>
  explainAlarm({ detector: 'clock-shift', cause: 'unknown', from, evidence: {} }, zone).causes.find(
    ({ cause }) => cause === 'daylight-saving',
  );

it('counts a shift of the hour in the two weeks before for a clock that nobody set, and its absence against', () => {
  expect(clock(SHIFT + 2 * DAY, 'America/New_York')?.evidenceFor).toContainEqual({
    sign: 'clocks-shifted',
    present: true,
  });
  expect(clock(SHIFT + 30 * DAY, 'America/New_York')?.evidenceAgainst).toContainEqual({
    sign: 'clocks-shifted',
    present: false,
  });
  expect(clock(SHIFT + 2 * DAY, 'America/Phoenix')?.evidenceFor).toEqual([]);
});

it('leaves the calendar out where the zone is none', () => {
  const [forIt, against] = [clock(SHIFT, 'Mars/Olympus')?.evidenceFor, clock(SHIFT, 'Mars/Olympus')?.evidenceAgainst];
  expect([forIt, against]).toEqual([[], []]);
});
