import { describe, expect, it } from 'vitest';
import { createHabitContact } from '#simulator/clocks/habit.ts';
import { createZone } from '#simulator/clocks/zone.ts';
import { MONDAY } from '#tests/support/simulated-pump.ts';

const MINUTE = 60_000;
const DAY = 86_400_000;
const zone = createZone('America/Los_Angeles');

function edges(habit: Parameters<typeof createHabitContact>[0], days: number) {
  const contact = createHabitContact(habit, zone, 'test');
  const list: { at: number; closed: boolean }[] = [];
  for (let at = MONDAY; at < MONDAY + days * DAY; ) {
    const state = contact.read(at);
    if (list.at(-1)?.closed !== state.closed) list.push({ at, closed: state.closed });
    expect(state.until).toBeGreaterThan(at);
    at = state.until;
  }
  return list;
}

describe('createHabitContact', () => {
  it('cycles a solar input between mid-morning and mid-afternoon on most days', () => {
    const closings = edges('solar', 30).filter(({ closed }) => closed);
    const days = new Set(closings.map(({ at }) => Math.floor(at / DAY)));
    const minutes = closings.map(({ at }) => ((at + zone.offsetAt(at)) % DAY) / MINUTE);

    expect(days.size).toBeGreaterThan(18);
    expect(closings.length).toBeGreaterThan(days.size);
    expect(Math.min(...minutes)).toBeGreaterThan(9.5 * 60);
    expect(Math.max(...minutes)).toBeLessThan(16 * 60);
  });

  it('heats the spa mostly on Friday and Saturday evenings', () => {
    const closings = edges('spa', 140).filter(({ closed }) => closed);
    const weekend = closings.filter(({ at }) => [4, 5].includes(Math.floor((at - MONDAY) / DAY) % 7));

    expect(closings.length).toBeGreaterThan(20);
    expect(weekend.length / closings.length).toBeGreaterThan(0.55);
  });

  it('never closes what nobody uses', () => {
    expect(edges('never', 10).some(({ closed }) => closed)).toBe(false);
  });

  it('answers the same whichever day is asked first', () => {
    const forward = createHabitContact('solar', zone, 'seed');
    const backward = createHabitContact('solar', zone, 'seed');
    const instants = Array.from({ length: 200 }, (_, index) => MONDAY + index * 97 * MINUTE);

    const expected = instants.map((at) => forward.read(at).closed);

    expect(
      [...instants]
        .reverse()
        .map((at) => backward.read(at).closed)
        .reverse(),
    ).toEqual(expected);
  });
});
