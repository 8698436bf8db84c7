import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';
import { refoldRuns } from '#shared/domain/runs/refold-runs.ts';
import { DAY_MS, HOUR_MS } from '#shared/domain/time/local-time.ts';
import { listReadings, listStoredRuns, replaceRuns } from './late-runs-repository.ts';
import type { PumpSlot } from './pump-slot.ts';
import { findTouchedStretch } from './touched-stretch.ts';

/** Control is taught by this much before the stretch that is corrected. */
const LEAD_IN_MS = 6 * HOUR_MS;

type Options = { readonly pool: pg.Pool; readonly epoch: number };

/**
 * Works out again, from all readings, the runs that a pump's late readings touch; alarms are not touched. Late readings
 * that reach into the run that is still open are looked at again later. Says whether anything was corrected.
 */
export async function correctLateRuns({ pool, epoch }: Options, slot: PumpSlot): Promise<boolean> {
  const { pumpId, pumpNumber, context } = slot.pump;
  const lateAt = [...slot.lateAt];
  const stretch = await asMachine(pool, async (db, client) => {
    const stored = await listStoredRuns(client, pumpId, Math.min(...lateAt) - DAY_MS);
    const touched = findTouchedStretch(stored, lateAt);
    if (touched === undefined) return undefined;
    const { from, to } = touched;
    const readings = await listReadings(client, pumpNumber, from - LEAD_IN_MS, to);
    const runs = refoldRuns(context, readings, { from, to, lateAt, stored });
    await replaceRuns(client, db, { epoch, pumpId, from, to }, runs);
    return touched;
  });
  if (stretch === undefined) return false;
  slot.lateAt = stretch.isFirm ? slot.lateAt.filter((at) => !lateAt.includes(at)) : slot.lateAt;
  return true;
}
