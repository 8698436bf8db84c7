import { describe, expect, it } from 'vitest';
import { DETECTORS } from '#shared/domain/detectors/detector.ts';
import { createDemoFleet } from '#simulator/demo-fleet.ts';
import { getFault } from '#simulator/faults/catalogue.ts';
import { LARKMOOR_LIVE, LIVE_ROUND_MINUTES } from '#simulator/scenarios/larkmoor-live.ts';
import { LARKMOOR_MONTH } from '#simulator/scenarios/larkmoor-month.ts';
import { findPump, playLive, startOf } from '#simulator/scenarios/scenario.ts';
import { createTruthBook } from '#simulator/truth.ts';
import type { News } from '#simulator/virtual-pump.ts';
import { MONDAY, readingsOf } from '#tests/support/simulated-pump.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;
const story = (cadenceMs: number) => ({ seed: 'larkmoor', from: MONDAY - 30 * DAY, to: MONDAY, cadenceMs });

/** Detectors that need more than a month's readings, or that speak of what was commissioned. */
const WITHOUT_SCRIPT = ['too-little-water', 'costly-program'];

describe('the month before the demo', () => {
  const fleet = createDemoFleet(story(60_000));

  it.each(LARKMOOR_MONTH)('has a pump that can have $fault at $pad', (line) => {
    const pump = findPump(fleet, line);

    expect(pump && getFault(line.fault).suits(pump.spec)).toBe(true);
  });

  it('never has two faults on one pump at once, with a day between them to recover', () => {
    const taken = new Map<string, [number, number][]>();
    for (const line of LARKMOOR_MONTH) {
      const pump = findPump(fleet, line);
      if (pump === undefined) continue;
      const from = startOf(pump, line, MONDAY);
      const spans = taken.get(pump.spec.serial) ?? [];
      for (const [otherFrom, otherTo] of spans) {
        const apart = from >= otherTo + DAY || otherFrom >= from + line.hours * HOUR + DAY;
        expect(apart, `${line.pad}: ${line.fault}`).toBe(true);
      }
      taken.set(pump.spec.serial, [...spans, [from, from + line.hours * HOUR]]);
    }
  });

  it('leaves the homeowner’s pump alone but for the street’s power cut', () => {
    expect(LARKMOOR_MONTH.filter(({ pad }) => pad === 'Saltern Way 12').map(({ fault }) => fault)).toEqual([
      'silent-power',
    ]);
  });

  it('shows every detector at least once for as long as its rule needs', () => {
    const truth = createTruthBook();
    const played = createDemoFleet(story(60_000), truth);
    for (const member of played.members) member.advance(MONDAY, () => undefined);
    const rows = truth.rows();
    const shown = new Set(rows.filter(({ required }) => required).map(({ detector }) => detector));

    expect(DETECTORS.filter((detector) => !shown.has(detector) && !WITHOUT_SCRIPT.includes(detector))).toEqual([]);
    expect(rows.filter(({ required }) => !required).map(({ fault, s }) => `${s} ${fault}`)).toEqual([]);
    expect(rows.every(({ detector }) => DETECTORS.some((known) => known === detector))).toBe(true);
  }, 120_000);
});

describe('the live round', () => {
  // Started at any hour of the day, somebody who watches for two minutes sees it.
  it.each([0, 7, 13, 22])('shows Tern Court failing to prime within two minutes, started at %i:00', (hour) => {
    const fleet = createDemoFleet({ ...story(10_000), pumps: 1 });
    const start = MONDAY + hour * HOUR;
    fleet.members[0]?.advance(start);
    playLive(fleet, LARKMOOR_LIVE, LIVE_ROUND_MINUTES, start);
    const news: News[] = [];
    fleet.members[0]?.advance(start + 2 * MINUTE, (item) => news.push(item));
    const readings = readingsOf(news);
    const tries = readings.filter(
      (reading, index) => reading.rpm > 0 && readings[index - 1]?.rpm === 0 && reading.reportedSource === 'prime',
    );
    const atSpeed = readings.filter((reading) => reading.rpm > 3400).map((reading) => reading.watts);

    expect(tries.length).toBeGreaterThanOrEqual(2);
    expect(Math.max(...atSpeed)).toBeLessThan(700);
  });

  it('cures Tern Court, and comes round again', () => {
    const fleet = createDemoFleet({ ...story(10_000), pumps: 1 });
    fleet.members[0]?.advance(MONDAY);
    playLive(fleet, LARKMOOR_LIVE, LIVE_ROUND_MINUTES, MONDAY);
    const wattsAt = (minutes: number) => {
      const news: News[] = [];
      fleet.members[0]?.advance(MONDAY + minutes * MINUTE, (item) => news.push(item));
      return readingsOf(news).at(-1);
    };

    expect(wattsAt(40)).toMatchObject({ rpm: expect.closeTo(1200, -2), reportedSource: 'program' });
    expect(fleet.pumps[0]?.troubles).toBe(0);
    wattsAt(LIVE_ROUND_MINUTES + 5);
    expect(fleet.pumps[0]?.troubles).toBe(1);
  });

  it('fits into its round, every line', () => {
    for (const line of LARKMOOR_LIVE) expect(line.afterMinutes + line.forMinutes).toBeLessThan(LIVE_ROUND_MINUTES - 1);
  });
});
