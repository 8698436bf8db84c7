import { describe, expect, it } from 'vitest';
import { type Arrival, createInProcessDevice } from '#simulator/device/in-process-device.ts';
import type { News } from '#simulator/virtual-pump.ts';

const MINUTE = 60_000;

function run(news: readonly News[], until: number): Arrival[] {
  const arrivals: Arrival[] = [];
  const device = createInProcessDevice(
    'MR-000101',
    { firmware: '1.4.2', storySeed: 'test' },
    () => 0,
    (arrival) => arrivals.push(arrival),
  );
  for (const item of news) device.hear(item);
  device.settle(until);
  return arrivals;
}

const reading = (at: number): News => ({
  kind: 'reading',
  at,
  reading: { at, rpm: 0, closedInputs: 0, activeInput: 0, watts: 6 },
});
const device = (at: number, up: boolean, boot = 0): News => ({ kind: 'device', at, up, boot, since: at });
const link = (at: number, up: boolean): News => ({ kind: 'link', at, up });
const statusesOf = (arrivals: readonly Arrival[]) =>
  arrivals.flatMap((arrival) => (arrival.kind === 'status' ? [{ at: arrival.at, ...arrival.status }] : []));
const batchesOf = (arrivals: readonly Arrival[]) =>
  arrivals.flatMap((arrival) =>
    arrival.kind === 'readings' ? [{ at: arrival.at, times: arrival.readings.map(({ at }) => at) }] : [],
  );

describe('a device in process', () => {
  it('delivers each reading by itself while it is connected', () => {
    expect(batchesOf(run([device(0, true), reading(1), reading(2)], 10))).toEqual([
      { at: 1, times: [1] },
      { at: 2, times: [2] },
    ]);
  });

  it('stores while its link is down and sends it all, oldest first, with times that strictly increase', () => {
    const stored = Array.from({ length: 700 }, (_, index) => reading(2 * MINUTE + index * 10_000));
    const back = 2 * MINUTE + 7_000_000;
    const arrivals = run(
      [device(0, true), reading(MINUTE), link(MINUTE + 1, false), ...stored, link(back, true), reading(back + MINUTE)],
      back + MINUTE,
    );
    const batches = batchesOf(arrivals);

    expect(batches.map(({ times }) => times.length)).toEqual([1, 500, 200, 1]);
    const times = batches.flatMap((batch) => batch.times);
    expect(times).toEqual([...new Set(times)].sort((a, b) => a - b));
    expect(batches[1]?.at).toBeGreaterThan(back);
  });

  it('is reported lost by its will once the broker gives up, and online again under a new connection', () => {
    const statuses = statusesOf(run([device(0, true), link(MINUTE, false), link(30 * MINUTE, true)], 40 * MINUTE));

    expect(statuses.map(({ state }) => state)).toEqual(['online', 'lost', 'online']);
    expect(statuses[1]).toMatchObject({ at: MINUTE + 180_000, connection: statuses[0]?.connection });
    expect(statuses[2]?.connection).not.toBe(statuses[0]?.connection);
  });

  it('has its old will come late when it is back before the broker gave up', () => {
    const statuses = statusesOf(run([device(0, true), link(MINUTE, false), link(MINUTE + 20_000, true)], 5 * MINUTE));

    expect(statuses.map(({ state }) => state)).toEqual(['online', 'online', 'lost']);
    expect(statuses[2]?.connection).toBe(statuses[0]?.connection);
  });

  it('keeps its boot over a lost link and has another after a lost supply', () => {
    const statuses = statusesOf(
      run(
        [
          device(0, true),
          link(1000, false),
          link(2000, true),
          device(30 * MINUTE, false),
          device(40 * MINUTE, true, 1),
        ],
        50 * MINUTE,
      ),
    );
    const boots = statuses.flatMap((status) => (status.state === 'online' ? [status.boot] : []));

    expect(boots[1]).toBe(boots[0]);
    expect(boots[2]).not.toBe(boots[0]);
  });

  it('drops the oldest when its store is full', () => {
    const many = Array.from({ length: 5000 }, (_, index) => reading(MINUTE + index * 10_000));
    const batches = batchesOf(run([device(0, true), link(1000, false), ...many, link(60_000_000, true)], 61_000_000));

    expect(batches.flatMap(({ times }) => times)).toHaveLength(4320);
    expect(batches.at(-1)?.times.at(-1)).toBe(MINUTE + 4999 * 10_000);
  });
});
