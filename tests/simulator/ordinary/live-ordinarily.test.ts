import { describe, expect, it } from 'vitest';
import { createConditions } from '#simulator/conditions.ts';
import { getFault } from '#simulator/faults/catalogue.ts';
import { liveOrdinarily } from '#simulator/ordinary/live-ordinarily.ts';
import { scheduleFault } from '#simulator/schedule-fault.ts';
import { MONDAY, makePump, play, specOf } from '#tests/support/simulated-pump.ts';

const HOUR = 3_600_000;
const DAY = 24 * HOUR;

function live(days: number, change: Parameters<typeof specOf>[1]) {
  const member = makePump(specOf('Sluice Walk 8', change), MONDAY, 'ordinary', 60_000);
  liveOrdinarily(member.pump, 'ordinary', MONDAY);
  return { member, news: play(member, MONDAY + days * DAY) };
}

describe('liveOrdinarily', () => {
  it('has the technician call on the route’s weekday, say so, and leave', () => {
    const { news } = live(29, { stopWeekday: 4 });
    const visits = news.flatMap((item) => (item.kind === 'on-site' ? [{ on: item.on, at: item.at - MONDAY }] : []));

    expect(visits.map(({ on }) => on)).toEqual([true, false, true, false, true, false, true, false]);
    // Thursdays, 8:30 to 15:00.
    for (const { on, at } of visits) {
      if (!on) continue;
      expect(Math.floor(at / DAY) % 7).toBe(3);
      expect((at % DAY) / HOUR).toBeGreaterThanOrEqual(8.5);
      expect((at % DAY) / HOUR).toBeLessThan(15);
    }
  });

  it('cleans basket and filter now and then, so that neither gets worse for ever', () => {
    const { member } = live(200, { stopWeekday: 2, lived: true });

    expect(member.pump.dirt.filter).toBeLessThan(2);
    expect(member.pump.dirt.basket).toBeLessThan(1.6);
    expect(member.pump.dirt.gallons).toBeGreaterThan(2_000_000);
  });

  it('has its keypad, its lever, its link and its lights do what a household’s do', () => {
    const { news } = live(200, { lived: true });
    const sources = new Set(news.flatMap((item) => (item.kind === 'reading' ? [item.reading.reportedSource] : [])));

    expect([...sources]).toEqual(expect.arrayContaining(['keypad', 'timed', 'stop']));
    expect([...sources]).not.toContain('fault');
    expect(news.filter((item) => item.kind === 'link' && !item.up).length).toBeGreaterThan(3);
  });

  it('leaves a healthy pump as it found it', () => {
    const { member } = live(100, { lived: true, stopWeekday: 1 });
    member.advance(MONDAY + 100 * DAY + 4 * HOUR);

    expect(member.pump.conditions).toEqual(createConditions());
    expect(member.pump).toMatchObject({ powered: true, linkUp: true, onSite: false, troubles: 0 });
    expect(member.pump.firmware).toMatchObject({ stopped: false, keypadRpm: undefined });
  });

  it('keeps its hands off while something is wrong', () => {
    const member = makePump(specOf('Sluice Walk 8', { lived: true, stopWeekday: 3 }), MONDAY, 'ordinary', 60_000);
    liveOrdinarily(member.pump, 'ordinary', MONDAY);
    scheduleFault(member.pump, getFault('stopped-by-keypad'), MONDAY + HOUR, MONDAY + 40 * DAY);
    const news = play(member, MONDAY + 40 * DAY - 1);

    expect(news.filter((item) => item.kind === 'on-site')).toEqual([]);
    expect(member.pump.command.source).toBe('stop');
  });

  it('does not begin a fault while somebody is at the pump', () => {
    const { member, news } = live(3, { stopWeekday: 3 });
    const visit = news.find((item) => item.kind === 'on-site');
    if (visit === undefined) throw new Error('nobody came');
    const again = makePump(specOf('Sluice Walk 8', { stopWeekday: 3 }), MONDAY, 'ordinary', 60_000);
    liveOrdinarily(again.pump, 'ordinary', MONDAY);
    scheduleFault(again.pump, getFault('drive-fault'), visit.at + 60_000, visit.at + 3 * HOUR);
    again.advance(visit.at + 10 * 60_000);

    expect(again.pump.troubles).toBe(0);
    again.advance(visit.at + HOUR);
    expect(again.pump.troubles).toBe(1);
    expect(member.pump.troubles).toBe(0);
  });
});
