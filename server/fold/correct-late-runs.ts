import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';

import { refoldRuns } from '#shared/domain/runs/refold-runs.ts';
import { HOUR_MS } from '#shared/domain/time/local-time.ts';
import { findOpenRunStart, findTouchedStretch, listReadings, replaceRuns } from './late-runs-repository.ts';
import type { PumpSlot } from './pump-slot.ts';

/** Control is taught by this much before the stretch that is corrected. */
const LEAD_IN_MS = 6 * HOUR_MS;

type Options = { readonly pool: pg.Pool; readonly epoch: number };

/**
 * Works out again, from all readings, the runs that a pump's late readings touch; alarms are not touched. Late readings
 * of the run that is still open wait until it has closed. Takes those that are corrected out of the slot and says
 * whether there were any.
 */
export async function correctLateRuns({ pool, epoch }: Options, slot: PumpSlot): Promise<boolean> {
  const { pumpId, pumpNumber, context } = slot.pump;
  const lateAt = [...slot.lateAt];
  const corrected = await asMachine(pool, async (_db, client) => {
    const stretch = await findTouchedStretch(client, pumpId, Math.min(...lateAt), Math.max(...lateAt));
    if (stretch === undefined) return lateAt;
    const to = stretch.to ?? (await findOpenRunStart(client, pumpId));
    if (to === undefined || to <= stretch.from) return [];
    const readings = await listReadings(client, pumpNumber, stretch.from - LEAD_IN_MS, to);
    const runs = refoldRuns(context, readings, { from: stretch.from, to, lateAt });
    await replaceRuns(client, { epoch, pumpId, from: stretch.from, to }, runs);
    return lateAt.filter((at) => at < to);
  });
  slot.lateAt = slot.lateAt.filter((at) => !corrected.includes(at));
  return corrected.length > 0;
}
