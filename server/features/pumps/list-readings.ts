import type { Context } from '#server/context.ts';
import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import { chooseBucketMs } from './choose-bucket.ts';
import { getPumpRow } from './get-pump-row.ts';
import { presentReadingSeries } from './present-reading-series.ts';
import { listReadingBuckets, listReadings as listSingleReadings } from './reading-read-model.ts';
import { listRunRows } from './run-read-model.ts';

type Asked = { readonly pumpId: string; readonly from: number; readonly until: number; readonly width: number };

/** A pump sends more often than its interval when something changes; a window of single readings takes this much more. */
const SPARE = 4;

/** Readings of one pump in a window as chart columns, at most about `width` of them. */
export async function listReadings(context: Context, { pumpId, width, ...window }: Asked): Promise<ReadingSeries> {
  const { db, now } = context;
  const pump = await getPumpRow(context, pumpId);
  const intervalMs = (pump.intervalSeconds ?? 10) * 1000;
  const asked = { pumpNumber: pump.pumpNumber, ...window };
  const bucketMs = chooseBucketMs(window, width, intervalMs);
  const buckets =
    bucketMs === 0 ? await listSingleReadings(db, asked, width * SPARE) : await listReadingBuckets(db, asked, bucketMs);
  const runs = await listRunRows(db, [pumpId], window);
  return presentReadingSeries(buckets, runs, { ...window, bucketMs, intervalMs, now });
}
