import pg from 'pg';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { DeviceMessage } from '#server/broker/device-message.ts';
import type { Arrival } from '#server/ingest/arrival.ts';
import { type Batch, MAX_BATCH_ROWS } from '#server/ingest/batch.ts';
import { createLane } from '#server/ingest/lane.ts';
import type { StoredMessage } from '#server/ingest/stored-message.ts';

const DEVICE = {
  serial: 'MR-000123',
  deviceId: 'd',
  companyId: 'c',
  secretHash: undefined,
  pump: { id: 'p', number: 1, inputCount: 3 },
};
const databaseError = (code: string) => Object.assign(new pg.DatabaseError('no', 0, 'error'), { code });

type Stored = { base: number; stored: Set<number> | undefined };
let now = 1_000_000;
let settled: string[] = [];
let stored: StoredMessage[] = [];
let doubted: number[] = [];
let givenUp: string[] = [];
let batches: string[][] = [];
let answers: ((batch: Batch) => Promise<Stored>)[] = [];
let base = 0;

const nameOf = (arrival: Arrival) => String(arrival.receivedAt);
const storeNow = async (): Promise<Stored> => {
  base += 1024;
  return { base, stored: undefined };
};

function startLane() {
  return createLane({
    now: () => now,
    decode: (message, settle): Arrival | undefined => {
      const count = Number(message.payload.toString());
      if (count < 0) return undefined;
      const readings = Array.from({ length: count }, (_, index) => ({
        at: message.receivedAt + index,
        rpm: 0,
        closedInputs: 0,
        activeInput: 0,
        watts: 0,
      }));
      const decoded = { readings, single: count === 1, status: undefined, settings: undefined, refusal: undefined };
      return { device: DEVICE, receivedAt: message.receivedAt, decoded, touchesDevice: false, settle };
    },
    store: (batch) => {
      batches.push(batch.arrivals.map(nameOf));
      return (answers.shift() ?? storeNow)(batch);
    },
    onStored: (messages) => stored.push(...messages),
    onUnstorable: (arrival) => givenUp.push(nameOf(arrival)),
    onUncertain: (arrivals) => doubted.push(arrivals.length),
  });
}

const message = (name: number, readings = 1): DeviceMessage => ({
  serial: DEVICE.serial,
  kind: 'readings',
  payload: Buffer.from(String(readings)),
  receivedAt: name,
});
const push = (lane: ReturnType<typeof startLane>, name: number, readings = 1) =>
  lane.push(message(name, readings), (error) => settled.push(error === undefined ? `${name}` : `${name} failed`));

beforeEach(() => {
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] });
  [settled, stored, doubted, givenUp, batches, answers] = [[], [], [], [], [], []];
});
afterEach(() => vi.useRealTimers());

describe('a lane', () => {
  it('stores together what arrives together, and acknowledges it in order once it is stored', async () => {
    let commit: () => void = () => undefined;
    answers.push(() => new Promise((resolve) => (commit = () => resolve({ base: 1024, stored: undefined }))));
    const lane = startLane();
    for (const name of [1, 2, 3]) push(lane, name);
    await vi.waitFor(() => expect(batches).toEqual([['1', '2', '3']]));
    push(lane, 4);
    expect(settled).toEqual([]);
    commit();
    await lane.drain();
    expect(settled).toEqual(['1', '2', '3', '4']);
    expect(batches).toEqual([['1', '2', '3'], ['4']]);
    expect(stored.map(({ receivedAt }) => receivedAt)).toEqual([1, 2, 3, 4]);
  });

  it('takes no more than a thousand rows at once, and leaves messages whole', async () => {
    const lane = startLane();
    for (const name of [1, 2, 3, 4, 5]) push(lane, name, 400);
    await lane.drain();
    expect(batches).toEqual([['1', '2'], ['3', '4'], ['5']]);
    expect(settled).toEqual(['1', '2', '3', '4', '5']);
    expect(400 * 2).toBeLessThanOrEqual(MAX_BATCH_ROWS);
  });

  it('tells of new readings only, with the sequence of the last of them', async () => {
    answers.push(async () => ({ base: 2048, stored: new Set([0, 3]) }));
    const lane = startLane();
    push(lane, 10, 2);
    push(lane, 20, 2);
    push(lane, 30, 1);
    await lane.drain();
    expect(
      stored.map(({ receivedAt, sequence, readings }) => [receivedAt, sequence, readings.map(({ at }) => at)]),
    ).toEqual([
      [10, 2048, [10]],
      [20, 2051, [21]],
    ]);
    expect(settled).toEqual(['10', '20', '30']);
  });

  it('holds what it has while the database is gone, and says that it may have been stored unheard', async () => {
    answers.push(() => Promise.reject(new Error('connection terminated')));
    const lane = startLane();
    now = 1_000_000;
    push(lane, now);
    await vi.waitFor(() => expect(doubted).toEqual([1]));
    expect(settled).toEqual([]);
    await vi.advanceTimersByTimeAsync(250);
    await lane.drain();
    expect(settled).toEqual([`${now}`]);
    // Once more when it was stored for certain: by then an earlier try's rows can be read.
    expect(doubted).toEqual([1, 1]);
  });

  it('hands messages back unacknowledged when the database stays away', async () => {
    const gone = () => Promise.reject(new Error('connection refused'));
    answers.push(gone, gone);
    const lane = startLane();
    push(lane, 1_000_000);
    await vi.waitFor(() => expect(doubted.length).toBe(1));
    now = 1_000_000 + 31_000;
    await vi.advanceTimersByTimeAsync(250);
    await lane.drain();
    expect(settled).toEqual(['1000000 failed']);
    now = 1_000_000;
  });

  it('tries a statement that lost a race again at once', async () => {
    answers.push(() => Promise.reject(databaseError('40P01')));
    const lane = startLane();
    push(lane, 1);
    await lane.drain();
    expect(batches.length).toBe(2);
    expect(settled).toEqual(['1']);
    expect(doubted).toEqual([]);
  });

  it('gives up the one message that the database cannot take, and stores and acknowledges the others in order', async () => {
    const poisoned = (batch: Batch) =>
      batch.arrivals.some((arrival) => nameOf(arrival) === '3') ? Promise.reject(databaseError('22003')) : storeNow();
    answers.push(...Array.from({ length: 20 }, () => poisoned));
    const lane = startLane();
    for (const name of [1, 2, 3, 4, 5, 6]) push(lane, name);
    await lane.drain();
    expect(givenUp).toEqual(['3']);
    expect(stored.map(({ receivedAt }) => receivedAt)).toEqual([1, 2, 4, 5, 6]);
    expect(settled).toEqual(['1', '2', '3', '4', '5', '6']);
  });

  it('closes the connection of a device that nobody knows any more', async () => {
    const lane = startLane();
    push(lane, 1, -1);
    push(lane, 2);
    await lane.drain();
    expect(settled).toEqual(['1 failed', '2']);
  });
});
