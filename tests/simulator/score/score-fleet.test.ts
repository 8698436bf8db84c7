import { describe, expect, it } from 'vitest';
import { readPadFile } from '#shared/contract/backtest/pad-file.ts';
import { encodeArrival } from '#simulator/arrival-line.ts';
import { generateHistory } from '#simulator/history.ts';
import { listLarkmoorPumps } from '#simulator/larkmoor.ts';
import { describePad } from '#simulator/score/pad-file.ts';
import { createScoreFleet } from '#simulator/score/score-fleet.ts';
import { encodeTruth } from '#simulator/truth.ts';

const DAY = 86_400_000;
const FROM = Date.UTC(2026, 9, 8);
const OPTIONS = { seed: 'test', pumps: 24, from: FROM, days: 40, cadenceMs: 60_000, each: 1 };

describe('createScoreFleet', () => {
  it('is the same for the same seed, to the last byte of readings and truth', () => {
    const bytes = () => {
      const { fleet, pads, truth } = createScoreFleet({ ...OPTIONS, pumps: 3, days: 12 });
      const readings = [...generateHistory(fleet, { to: FROM + 12 * DAY, latencyMs: 0 })].map(encodeArrival).join('');
      return JSON.stringify(pads) + readings + encodeTruth(truth.rows());
    };

    expect(bytes()).toBe(bytes());
  });

  it('writes pads that the backtest reads without a fault', () => {
    const { pads } = createScoreFleet(OPTIONS);
    const file = readPadFile(JSON.parse(JSON.stringify(pads)));

    expect(file?.faults).toEqual([]);
    expect(file?.pads).toHaveLength(24);
    expect(new Set(file?.pads.map(({ zone }) => zone)).size).toBe(6);
  });

  it('writes the demo company’s pads so as well', () => {
    const pads = listLarkmoorPumps().map((spec) => describePad(spec, 60_000));

    expect(readPadFile(JSON.parse(JSON.stringify(pads)))).toMatchObject({ faults: [] });
  });

  it('deals faults one at a time on a pump, after a week to learn, and leaves a third of the pumps well', () => {
    const { fleet, truth } = createScoreFleet(OPTIONS);
    for (const member of fleet.members) member.advance(FROM + 40 * DAY);
    const rows = truth.rows();
    const serials = new Set(rows.map(({ s }) => s));

    expect(rows.length).toBeGreaterThan(20);
    expect(serials.size).toBeLessThan(fleet.pumps.length);
    for (const serial of serials) {
      const inOrder = rows.filter(({ s }) => s === serial).sort((a, b) => a.begunAt - b.begunAt);
      expect((inOrder[0]?.begunAt ?? 0) - FROM).toBeGreaterThan(7 * DAY);
      for (const [index, { begunAt }] of inOrder.entries()) {
        if (index > 0)
          expect(begunAt).toBeGreaterThan((inOrder[index - 1]?.endedAt ?? Number.POSITIVE_INFINITY) + 3 * DAY);
      }
    }
  });

  it('has nothing wrong in it but short programs when no fault is asked for', () => {
    const { fleet, truth, standing } = createScoreFleet({ ...OPTIONS, each: 0, pumps: 120 });
    for (const member of fleet.members) member.advance(FROM + 2 * DAY);

    expect(truth.rows()).toEqual([]);
    expect(standing.length).toBeGreaterThan(0);
    expect(new Set(standing.map(({ detector }) => detector))).toEqual(new Set(['too-little-water']));
  });
});
