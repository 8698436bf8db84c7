import type pg from 'pg';
import { MAX_BATCH_ROWS } from '#server/ingest/batch.ts';
import { storeBatch } from '#server/ingest/ingest-repository.ts';
import { createReadingColumns } from '#server/ingest/reading-columns.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';

/** Stores the readings of a history in batches, through the statement that stores live ones. */
export type HistoryReadings = {
  readonly add: (reading: Reading, pumpNumber: number, receivedAt: number, single: boolean) => Promise<void>;
  readonly flush: () => Promise<void>;
  /** Resolves when the connection is free again. */
  readonly settle: () => Promise<unknown>;
  readonly count: () => number;
};

export function createHistoryReadings(client: pg.ClientBase): HistoryReadings {
  let columns = createReadingColumns();
  let waiting = 0;
  let stored = 0;
  let storing: Promise<unknown> = Promise.resolve();

  /** One batch is stored while the next one is folded. */
  const flush = async (): Promise<void> => {
    await storing;
    if (waiting === 0) return;
    const input = { readingCount: waiting, readings: columns.toParameters(), rest: undefined };
    stored += waiting;
    waiting = 0;
    columns = createReadingColumns();
    storing = storeBatch(client, input);
    // Whoever adds or flushes next hears of a failure.
    storing.catch(() => undefined);
  };

  return {
    add: async (reading, pumpNumber, receivedAt, single) => {
      columns.add(reading, waiting, pumpNumber, receivedAt, single);
      waiting += 1;
      if (waiting >= MAX_BATCH_ROWS) await flush();
    },
    flush: async () => {
      await flush();
      await storing;
    },
    settle: () => storing,
    count: () => stored,
  };
}
