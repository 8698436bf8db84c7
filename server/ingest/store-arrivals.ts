import type { Arrival } from './arrival.ts';
import { type Batch, createBatch } from './batch.ts';
import { classifyDatabaseFault } from './database-fault.ts';
import type { StoredBatch } from './ingest-repository.ts';
import type { StoredMessage } from './stored-message.ts';

export type StoreArrivalsOptions = {
  readonly store: (batch: Batch) => Promise<StoredBatch>;
  /** A message that the database cannot take: it is given up so that it does not stop those behind it. */
  readonly onUnstorable: (arrival: Arrival, error: unknown) => void;
};

/** How often a statement that lost a race is tried again. */
const MOST_RACES = 5;

/**
 * Stores a batch. Where the database refuses the data of one message (which decoding should have made impossible), the
 * batch is halved until that message stands alone and is given up: one poisoned message stops nobody. Rejects when the
 * database is gone.
 */
export async function storeArrivals(options: StoreArrivalsOptions, batch: Batch, races = 0): Promise<StoredMessage[]> {
  try {
    const { base, stored } = await options.store(batch);
    return batch.listStored(base, stored);
  } catch (error) {
    const fault = classifyDatabaseFault(error);
    if (fault === 'again' && races < MOST_RACES) return storeArrivals(options, batch, races + 1);
    if (fault !== 'data') throw error;
    return storeHalves(options, batch, error);
  }
}

async function storeHalves(options: StoreArrivalsOptions, batch: Batch, error: unknown): Promise<StoredMessage[]> {
  const { arrivals } = batch;
  const [only] = arrivals;
  if (only === undefined) return [];
  if (arrivals.length === 1) {
    options.onUnstorable(only, error);
    return [];
  }
  const middle = Math.ceil(arrivals.length / 2);
  const first = await storeArrivals(options, batchOf(arrivals.slice(0, middle)));
  return [...first, ...(await storeArrivals(options, batchOf(arrivals.slice(middle))))];
}

function batchOf(arrivals: readonly Arrival[]): Batch {
  const batch = createBatch();
  for (const arrival of arrivals) batch.add(arrival);
  return batch;
}
