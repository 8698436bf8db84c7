import { describe, expect, it } from 'vitest';
import { createZone } from '#simulator/clocks/zone.ts';

const HOUR = 3_600_000;

describe('createZone', () => {
  // Energy Policy Act of 2005: daylight saving ends at 2:00 on the first Sunday of November.
  it('changes where the law says, in the autumn of 2026', () => {
    const zone = createZone('America/Los_Angeles');
    const change = Date.UTC(2026, 10, 1, 9);

    expect(zone.nextChangeAfter(Date.UTC(2026, 8, 1))).toBe(change);
    expect(zone.offsetAt(change - 1)).toBe(-7 * HOUR);
    expect(zone.offsetAt(change)).toBe(-8 * HOUR);
  });

  it('knows the southern hemisphere', () => {
    const zone = createZone('Australia/Sydney');

    expect(zone.offsetAt(Date.UTC(2026, 6, 1))).toBe(10 * HOUR);
    expect(zone.offsetAt(Date.UTC(2027, 0, 1))).toBe(11 * HOUR);
    expect(zone.nextChangeAfter(Date.UTC(2026, 6, 1))).toBe(Date.UTC(2026, 9, 3, 16));
  });

  it('never changes where there is no daylight saving', () => {
    const zone = createZone('America/Phoenix');

    expect(zone.nextChangeAfter(Date.UTC(2026, 8, 1))).toBe(Number.POSITIVE_INFINITY);
    expect(zone.offsetAt(0)).toBe(-7 * HOUR);
  });

  it('answers the same in whatever order it is asked', () => {
    const instants = Array.from({ length: 60 }, (_, index) => Date.UTC(2026, 0, 1) + index * 13 * 24 * HOUR);
    const forward = createZone('Europe/Madrid');
    const backward = createZone('Europe/Madrid');

    const expected = instants.map((at) => forward.offsetAt(at));

    expect(
      [...instants]
        .reverse()
        .map((at) => backward.offsetAt(at))
        .reverse(),
    ).toEqual(expected);
    expect(new Set(expected)).toEqual(new Set([HOUR, 2 * HOUR]));
  });

  it('refuses a zone that does not exist', () => {
    expect(() => createZone('Mars/Olympus')).toThrow();
  });
});
