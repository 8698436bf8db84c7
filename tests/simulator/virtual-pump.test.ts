import { describe, expect, it } from 'vitest';
import { trueWatts } from '#simulator/observe.ts';
import { liveOrdinarily } from '#simulator/ordinary/live-ordinarily.ts';
import { press } from '#simulator/pad-deeds.ts';
import { cutPower } from '#simulator/power.ts';
import { addDeed } from '#simulator/pump.ts';
import { MONDAY, makePump, play, readingsOf, specOf } from '#tests/support/simulated-pump.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

describe('a virtual pump', () => {
  it('runs its program, its inputs and a prime on every start', () => {
    const readings = readingsOf(play(makePump(specOf('Sluice Walk 8')), MONDAY + DAY));
    const sources = readings
      .map((reading) => reading.reportedSource)
      .filter((source, index, all) => source !== all[index - 1]);

    // Program 08:00 to 18:00, input 1 from 09:00 to 11:40, input 2 from 13:00 to 15:45.
    expect(sources).toEqual(['off', 'prime', 'program', 'input', 'program', 'input', 'program', 'off']);
  });

  it('speaks at its cadence while it is steady, oftener when it primes, and at once when something changes', () => {
    const readings = readingsOf(play(makePump(specOf('Sluice Walk 8'), MONDAY, 'test', 60_000), MONDAY + DAY));
    const gaps = readings.map((reading, index) => reading.at - (readings[index - 1]?.at ?? reading.at - 1));
    const changed = readings.filter(
      (reading, index) => reading.closedInputs !== readings[index - 1]?.closedInputs && index > 0,
    );
    const ramp = readings.filter((reading) => reading.reportedSource === 'prime' && reading.rpm < 3400);

    expect(Math.max(...gaps)).toBe(60_000);
    expect(Math.min(...gaps)).toBeGreaterThan(0);
    expect(changed).toHaveLength(4);
    // From standstill to 3450 rpm at 420 rpm/s, looked at every second.
    expect(ramp.length).toBeGreaterThanOrEqual(6);
    expect(readings.filter((reading) => reading.reportedSource === 'prime').length).toBeGreaterThan(25);
  });

  it('is in the same state whether anybody watched or not', () => {
    const watched = makePump(specOf('Windmill Yard 1', { lived: true, stopWeekday: 2 }));
    const alone = makePump(specOf('Windmill Yard 1', { lived: true, stopWeekday: 2 }));
    for (const { pump } of [watched, alone]) liveOrdinarily(pump, 'test', MONDAY);

    for (let at = MONDAY; at <= MONDAY + 5 * DAY; at += 37 * MINUTE) play(watched, at);
    play(watched, MONDAY + 5 * DAY);
    alone.advance(MONDAY + 5 * DAY);

    const stateOf = ({ pump }: typeof watched) => ({
      shaft: pump.shaft,
      firmware: pump.firmware,
      dirt: pump.dirt,
      closed: pump.closed,
      next: pump.chance.next(),
    });
    expect(stateOf(alone)).toEqual(stateOf(watched));
  });

  it('tells nothing of the time in which nobody watched', () => {
    const member = makePump(specOf('Saltern Way 12'));
    member.advance(MONDAY + 10 * HOUR);

    const readings = readingsOf(play(member, MONDAY + 11 * HOUR));

    expect(readings[0]?.at).toBe(MONDAY + 10 * HOUR);
  });

  it('says nothing while it is without power, then boots, primes and goes on', () => {
    const member = makePump(specOf('Paddock View 56'));
    addDeed(member.pump, MONDAY + 2 * HOUR, (pump, at) => cutPower(pump, at, at + 30 * MINUTE, 'street'));
    const news = play(member, MONDAY + 3 * HOUR);
    const readings = readingsOf(news);
    const after = readings.find((reading) => reading.at >= MONDAY + 2.5 * HOUR);

    expect(readings.filter((reading) => reading.at >= MONDAY + 2 * HOUR && reading.at < MONDAY + 2.5 * HOUR)).toEqual(
      [],
    );
    expect(
      news.filter((item) => item.kind === 'device').map((item) => item.kind === 'device' && [item.up, item.boot]),
    ).toEqual([
      [true, 0],
      [false, 0],
      [true, 1],
    ]);
    expect(after?.reportedSource).toBe('prime');
  });

  it('takes watts by the cube of the speed, roughly, and less when it holds air', () => {
    const { pump, advance } = makePump(specOf('Paddock View 56'));
    advance(MONDAY + HOUR);
    const at = (rpm: number) => trueWatts(pump, rpm, MONDAY + HOUR);

    expect(at(3450) / at(1725)).toBeGreaterThan(5.5);
    expect(at(3450) / at(1725)).toBeLessThan(8);
    const full = at(2850);
    pump.water.fill = 0;
    pump.water.target = 0;
    expect(at(2850) / full).toBeLessThan(0.4);
  });

  it('goes up in watts from dry to primed during a prime', () => {
    const spec = specOf('Sluice Walk 8', { suction: { primeSeconds: 60, restFill: 0.3, drainHours: 1 } });
    const readings = readingsOf(play(makePump(spec), MONDAY + 9 * HOUR));
    const priming = readings.filter((reading) => reading.reportedSource === 'prime' && reading.rpm > 3400);
    const first = priming[0]?.watts ?? 0;
    const last = priming.at(-1)?.watts ?? 0;

    expect(first / last).toBeLessThan(0.45);
    expect(priming.findIndex((reading) => reading.watts > 0.8 * last)).toBeGreaterThan(2);
  });

  it('obeys its keypad until somebody lets it go on', () => {
    const member = makePump(specOf('Saltern Way 12'));
    member.advance(MONDAY + 6 * HOUR);
    press(member.pump, { key: 'stop' }, member.pump.now);
    member.pump.decideAt = member.pump.now;
    const stopped = readingsOf(play(member, MONDAY + 7 * HOUR));

    expect(stopped.at(-1)).toMatchObject({ rpm: 0, reportedSource: 'stop' });
  });
});
