import { describe, expect, it } from 'vitest';
import { findMailHoursBegin } from '#server/mail/mail-hours.ts';

const WEEKDAYS = { days: [true, true, true, true, true, false, false], fromMinute: 7 * 60, toMinute: 19 * 60 };
const ZONE = 'America/New_York';

describe('mail hours', () => {
  it('hold nothing back inside them', () => {
    // Monday 2025-07-14, 12:00 in New York (UTC−4).
    expect(findMailHoursBegin(WEEKDAYS, ZONE, Date.UTC(2025, 6, 14, 16))).toBeUndefined();
  });

  it('begin the same day before them, the next day after them, and on Monday at the weekend', () => {
    const monday = Date.UTC(2025, 6, 14, 11);
    expect(findMailHoursBegin(WEEKDAYS, ZONE, Date.UTC(2025, 6, 14, 10))).toBe(monday);
    expect(findMailHoursBegin(WEEKDAYS, ZONE, Date.UTC(2025, 6, 14, 23))).toBe(Date.UTC(2025, 6, 15, 11));
    expect(findMailHoursBegin(WEEKDAYS, ZONE, Date.UTC(2025, 6, 12, 16))).toBe(monday);
  });

  it('begin by the wall clock on the day on which the clocks change', () => {
    // 2025-03-09: from 02:00 on New York is at UTC−4.
    const everyDay = { ...WEEKDAYS, days: [true, true, true, true, true, true, true] };
    expect(findMailHoursBegin(everyDay, ZONE, Date.UTC(2025, 2, 9, 4))).toBe(Date.UTC(2025, 2, 9, 11));
  });

  it('never begin where no day has any', () => {
    const never = { ...WEEKDAYS, days: WEEKDAYS.days.map(() => false) };
    expect(findMailHoursBegin(never, ZONE, Date.UTC(2025, 6, 14, 16))).toBeUndefined();
  });
});
