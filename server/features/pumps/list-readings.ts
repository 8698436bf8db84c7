import type { Context } from '#server/context.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { ReadingSeries } from '#shared/contract/http/pumps.ts';
import { chooseBucketMs, DAY_MS } from './choose-bucket.ts';
import { getPumpRow } from './get-pump-row.ts';
import { presentReadingSeries } from './present-reading-series.ts';
import { listReadingBuckets, listReadings as listSingleReadings, type ReadingBucket } from './reading-read-model.ts';
import { findCoverage, findFivesEnd, listDayBuckets, listFiveBuckets, listHourBuckets } from './rolled-read-model.ts';
import { listRunRows } from './run-read-model.ts';

type Asked = { readonly pumpId: string; readonly from: number; readonly until: number; readonly width: number };
type Window = { readonly pumpId: string; readonly pumpNumber: number; readonly from: number; readonly until: number };

/** A pump sends more often than its interval when something changes; a window of single readings takes this much more. */
const SPARE = 4;
const FIVE_MS = 300_000;
const HOUR_MS = 3_600_000;
/** Beyond this a window has more runs than a chart can tell apart: no expected speed is drawn. */
const MOST_RUNS_MS = 35 * 24 * HOUR_MS;

/** Readings of one pump in a window as chart columns, at most about `width` of them; of long windows from the rollups. */
export async function listReadings(context: Context, { pumpId, width, ...window }: Asked): Promise<ReadingSeries> {
  const { db, now } = context;
  const pump = await getPumpRow(context, pumpId);
  const intervalMs = (pump.intervalSeconds ?? 10) * 1000;
  const asked = { pumpId, pumpNumber: pump.pumpNumber, ...window };
  const bucketMs = chooseBucketMs(window, width, intervalMs);
  const buckets = await listBuckets(db, asked, bucketMs, width);
  const isLong = window.until - window.from > MOST_RUNS_MS;
  const runs = isLong ? [] : await listRunRows(db, [pumpId], window);
  const series = presentReadingSeries(buckets, runs, { ...window, bucketMs, intervalMs, now });
  return isLong ? { ...series, coverage: await findCoverage(db, asked, now) } : series;
}

function listBuckets(db: Transaction, asked: Window, bucketMs: number, width: number): Promise<ReadingBucket[]> {
  if (bucketMs === 0) return listSingleReadings(db, asked, width * SPARE);
  if (bucketMs < FIVE_MS) return listReadingBuckets(db, asked, bucketMs);
  if (bucketMs < HOUR_MS) return listMixedBuckets(db, asked, bucketMs);
  return bucketMs < DAY_MS ? listHourBuckets(db, asked, bucketMs) : listDayBuckets(db, asked, bucketMs / DAY_MS);
}

/** Days that are over come in stored steps of five minutes, the rest from the readings themselves. */
async function listMixedBuckets(db: Transaction, asked: Window, bucketMs: number): Promise<ReadingBucket[]> {
  const end = (await findFivesEnd(db, asked)) ?? asked.from;
  // The first bucket that is not whole in the stored steps, and those after it.
  const seam = asked.from + Math.max(0, Math.floor((end - asked.from) / bucketMs)) * bucketMs;
  const until = Math.min(seam, asked.until);
  const stored = until > asked.from ? await listFiveBuckets(db, { ...asked, until }, bucketMs) : [];
  const rest = seam < asked.until ? await listReadingBuckets(db, { ...asked, from: seam }, bucketMs) : [];
  return [...stored, ...rest];
}
