import { describe, expect, it } from 'vitest';
import { createBacktest } from '#server/backtest/backtest.ts';
import { parseLine } from '#server/backtest/parse-line.ts';
import { readPadFile } from '#shared/contract/backtest/pad-file.ts';

const MINUTE = 60_000;
const FROM = Date.UTC(2026, 5, 1, 13);
const SETTINGS = { inputs: [2850, 2400, null], program: [{ days: '1111111', from: '00:00', to: '24:00', rpm: 1700 }] };
type Line = Readonly<Record<string, unknown>>;

const pad = (serial: string, area?: string) => ({
  serial,
  timezone: 'America/Phoenix',
  area,
  settings: SETTINGS,
  intervalS: 60,
});
const reading = (s: string, minute: number, more: Line = {}): Line => ({
  s,
  t: FROM + minute * MINUTE,
  rpm: 1700,
  in: 0,
  act: 0,
  w: 200,
  src: 'program',
  ...more,
});
const minutes = (s: string, from: number, to: number): Line[] =>
  Array.from({ length: to - from }, (_, index) => reading(s, from + index));

function play(pads: readonly unknown[], lines: readonly Line[]) {
  const backtest = createBacktest(readPadFile(JSON.parse(JSON.stringify(pads)))?.pads ?? []);
  const refusals = lines.map((line) => {
    const parsed = parseLine(JSON.stringify(line));
    return parsed.kind === 'event' ? backtest.take(parsed.serial, parsed.event) : parsed.reason;
  });
  return { alarms: backtest.end(), refusals: refusals.filter((one) => one !== undefined), count: backtest.count() };
}

const byArrival = (lines: readonly Line[]): Line[] =>
  lines.toSorted((a, b) => Number(a.t ?? a.at) - Number(b.t ?? b.at));

describe('a backtest', () => {
  it('lets time pass between two lines, so that silence is raised at its hour', () => {
    const { alarms } = play([pad('MR-000001')], [...minutes('MR-000001', 0, 30), ...minutes('MR-000001', 329, 350)]);
    expect(alarms).toHaveLength(1);
    expect(alarms[0]).toMatchObject({ detector: 'silent', from: FROM + 29 * MINUTE, to: FROM + 329 * MINUTE });
    expect(alarms[0]?.raised).toBe(FROM + 89 * MINUTE);
  });

  it('blames the power where neighbours of one area went within ten minutes, and nothing where they did not', () => {
    const silentFrom = (serial: string, minute: number) => minutes(serial, 0, minute);
    const pads = [pad('MR-000001', 'North'), pad('MR-000002', 'North'), pad('MR-000003', 'South'), pad('MR-000004')];
    const lines = [
      ...silentFrom('MR-000001', 30),
      ...silentFrom('MR-000002', 36),
      ...silentFrom('MR-000003', 33),
      ...minutes('MR-000004', 0, 200),
    ];
    const causes = play(pads, byArrival(lines)).alarms.map(({ s, cause }) => [s, cause]);
    expect(causes.toSorted()).toEqual([
      ['MR-000001', 'power'],
      ['MR-000002', 'power'],
      ['MR-000003', 'unknown'],
    ]);
  });

  it('says once that our own link is down, with the pads it took', () => {
    const serials = ['MR-000001', 'MR-000002', 'MR-000003', 'MR-000004', 'MR-000005', 'MR-000006'];
    const pads = serials.map((serial, index) => pad(serial, index % 2 === 0 ? 'North' : 'South'));
    const lost = serials.slice(0, 5).flatMap((serial) => [...minutes(serial, 0, 30), ...minutes(serial, 150, 200)]);
    const { alarms } = play([...pads], byArrival([...lost, ...minutes('MR-000006', 0, 200)]));
    expect(alarms).toHaveLength(1);
    expect(alarms[0]).toMatchObject({ detector: 'silent', cause: 'link', pads: serials.slice(0, 5) });
    expect(alarms[0]?.s).toBeUndefined();
  });

  const fleet = ['MR-000001', 'MR-000002', 'MR-000003', 'MR-000004', 'MR-000005', 'MR-000006'];
  const fleetPads = fleet.map((serial, index) => pad(serial, index % 2 === 0 ? 'North' : 'South'));
  const CONNECTION = '8f2f6c1e-5d0b-4f0e-9a53-0c6b9a1d2e3f';
  const statusOf = (s: string, minute: number, status: Line): Line => ({ s, at: FROM + minute * MINUTE, status });
  const online = (s: string, minute: number): Line =>
    statusOf(s, minute, { state: 'online', conn: CONNECTION, boot: CONNECTION, up: 5, fw: '1.0' });
  const linkLines = (lines: readonly Line[]) =>
    play(fleetPads, byArrival(lines)).alarms.filter(({ cause }) => cause === 'link');

  it('does not take the end of the readings for our own link', () => {
    const ends = fleet.flatMap((serial, index) => minutes(serial, 0, index < 5 ? 120 : 300));
    expect(linkLines(ends)).toEqual([]);
    // Each on a pad of its own that says nothing any more: their own lines stay.
    expect(play(fleetPads, byArrival(ends)).alarms.filter(({ detector }) => detector === 'silent')).toHaveLength(5);
    expect(linkLines([...ends, ...fleet.map((serial) => online(serial, 0))])).toEqual([]);
  });

  it('judges by the connections where the trace has them', () => {
    const lines = (lost: boolean, until: number) => [
      ...fleet.map((serial) => online(serial, 0)),
      ...fleet.flatMap((serial, index) =>
        index < 5 ? [...minutes(serial, 0, 30), ...minutes(serial, until, 200)] : minutes(serial, 0, 200),
      ),
      ...(lost ? fleet.slice(0, 5).map((serial) => statusOf(serial, 30, { state: 'lost', conn: CONNECTION })) : []),
    ];
    expect(linkLines(lines(false, 150))).toEqual([]);
    expect(linkLines(lines(true, 32))).toEqual([]);
    const [line, ...more] = linkLines(lines(true, 150));
    expect(more).toEqual([]);
    expect(line).toMatchObject({ from: FROM + 30 * MINUTE, pads: fleet.slice(0, 5) });
    expect((line?.raised ?? 0) - FROM).toBeLessThanOrEqual(33 * MINUTE);
    expect((line?.to ?? 0) - FROM).toBeLessThanOrEqual(151 * MINUTE);
  });

  it('takes a late reading for a word from the device and for no more', () => {
    const late = Array.from({ length: 120 }, (_, index) =>
      reading('MR-000001', 10, { at: FROM + (30 + index) * MINUTE, rpm: 0, src: 'off' }),
    );
    const { alarms, count } = play([pad('MR-000001')], [...minutes('MR-000001', 0, 30), ...late]);
    expect(alarms).toEqual([]);
    expect(count.late).toBe(120);
  });

  it('refuses by name what the broker would refuse', () => {
    const { refusals, count } = play(
      [pad('MR-000001')],
      [
        reading('MR-000001', 0),
        reading('MR-000001', 20, { at: FROM + MINUTE }),
        reading('MR-000001', 2, { in: 8 }),
        reading('MR-000001', 3, { act: 4 }),
        reading('MR-000001', 4, { w: -3 }),
        reading('MR-000001', 5),
      ],
    );
    expect(refusals).toEqual(['ahead', 'in-beyond-model', 'act-beyond-model', 'w-negative']);
    expect(count.readings).toBe(2);
  });
});
