import { describe, expect, it } from 'vitest';
import { dialMs, passZoneChange, setDial, startDial, stopDial } from '#simulator/clocks/dial.ts';
import { createTimeClock, readTimeClock } from '#simulator/clocks/time-clock.ts';
import { createZone } from '#simulator/clocks/zone.ts';
import { cutPower } from '#simulator/power.ts';
import { MONDAY, makePump, play, readingsOf, specOf } from '#tests/support/simulated-pump.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;
const TRIPPERS = [
  { days: Array.from({ length: 7 }, () => true), onMinute: 480, offMinute: 720, opensEarlyMinutes: 20 },
];
const zone = createZone('America/Los_Angeles');

/** Local time of day of every closing of input 1, minutes after midnight. */
function closings(padName: string, disturb: (member: ReturnType<typeof makePump>) => void, from: number, days: number) {
  const member = makePump(specOf(padName), from);
  disturb(member);
  const readings = readingsOf(play(member, from + days * DAY));
  return readings.flatMap((reading, index) => {
    const before = readings[index - 1];
    if (before === undefined || (before.closedInputs & 1) === (reading.closedInputs & 1)) return [];
    if ((reading.closedInputs & 1) === 0) return [];
    const wall = reading.at + zone.offsetAt(reading.at);
    return [Math.round((wall % DAY) / MINUTE)];
  });
}

describe('readTimeClock', () => {
  it('closes at the on tripper and opens early by the switch’s own minutes', () => {
    const clock = createTimeClock('synchronous', 'own', TRIPPERS, zone.offsetAt(MONDAY), MONDAY);

    expect(readTimeClock(clock, MONDAY + 479 * MINUTE)).toEqual({ closed: false, until: MONDAY + 480 * MINUTE });
    expect(readTimeClock(clock, MONDAY + 480 * MINUTE)).toEqual({ closed: true, until: MONDAY + 700 * MINUTE });
    expect(readTimeClock(clock, MONDAY + 700 * MINUTE).closed).toBe(false);
  });

  it('stands while its supply is gone and goes on from there', () => {
    const { dial } = createTimeClock('synchronous', 'own', TRIPPERS, 0, 0);

    stopDial(dial, HOUR);
    expect(dialMs(dial, 3 * HOUR)).toBe(HOUR);
    startDial(dial, 3 * HOUR);

    expect(dialMs(dial, 4 * HOUR)).toBe(2 * HOUR);
  });
});

describe('a dial on a pad', () => {
  it('is late by the outage after a cut, from then on', () => {
    const usual = closings('Tern Court 4', () => undefined, MONDAY, 3);
    const late = closings(
      'Tern Court 4',
      ({ pump }) => cutPower(pump, MONDAY + 100, MONDAY + 100 + 95 * MINUTE, 'street'),
      MONDAY,
      3,
    );

    expect(usual).toHaveLength(3);
    expect(late.map((minute, index) => minute - (usual[index] ?? 0))).toEqual([95, 95, 95]);
  });

  it('is not stopped by a cut at the motor’s breaker when it has a circuit of its own', () => {
    const usual = closings('Tern Court 4', () => undefined, MONDAY, 2);
    const after = closings(
      'Tern Court 4',
      ({ pump }) => cutPower(pump, MONDAY + 100, MONDAY + 95 * MINUTE, 'motor'),
      MONDAY,
      2,
    );

    expect(after).toEqual(usual);
  });

  it('bridges a cut with its carry-over', () => {
    const cut = ({ pump }: ReturnType<typeof makePump>) => cutPower(pump, MONDAY + 100, MONDAY + 95 * MINUTE, 'street');

    expect(closings('Fennel Street 9', cut, MONDAY, 2)).toEqual(
      closings('Fennel Street 9', () => undefined, MONDAY, 2),
    );
  });

  it('forgets daylight saving: an hour early by the wall after the autumn change', () => {
    const saturday = Date.UTC(2026, 9, 31, 7);
    const forgetful = specOf('Tern Court 4', { dialsKept: false });
    const member = makePump(forgetful, saturday);
    const contact = member.pump.contacts[0];
    play(member, saturday + 3 * DAY);
    const at = member.pump.now;

    expect(
      Math.round((dialMs(contact?.clock?.dial ?? member.pump.motorClock, at) - at - zone.offsetAt(at)) / HOUR),
    ).toBe(1);
  });

  it('follows daylight saving when it is electronic', () => {
    const { dial } = createTimeClock('electronic', 'own', TRIPPERS, -7 * HOUR, 0);

    passZoneChange(dial, zone, Date.UTC(2026, 10, 1, 9));

    expect(dial.offsetMs).toBe(-8 * HOUR);
  });

  it('is right again when somebody sets it', () => {
    const { dial } = createTimeClock('synchronous', 'own', TRIPPERS, 0, 0);

    setDial(dial, zone, MONDAY, 0);

    expect(dialMs(dial, MONDAY)).toBe(MONDAY + zone.offsetAt(MONDAY));
  });
});
