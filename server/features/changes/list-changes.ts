import type { Actor } from '#server/context.ts';
import type { Transaction } from '#server/db/transaction.ts';
import { listAlarmRowsChangedSince, presentAlarm } from '#server/features/alarms/index.ts';
import {
  listPumpLiveRows,
  listRunRowsChangedSince,
  presentPumpLive,
  presentRun,
} from '#server/features/pumps/index.ts';
import type { Changes } from '#shared/contract/http/changes.ts';
import { findCursor, listPumpIdsChangedSince } from './change-read-model.ts';

/** More than this and reading the screens again is cheaper. */
const MOST = { pumps: 2000, runs: 4000, alarms: 1000 } as const;

type Asking = { readonly db: Transaction; readonly actor: Pick<Actor, 'role'>; readonly now: number };

/**
 * Everything the person may see that changed since a cursor, and the cursor to ask from next. Needs a transaction with
 * one snapshot: the new cursor must not be later than what was read.
 */
export async function listChanges({ db, actor, now }: Asking, since: string): Promise<Changes> {
  const cursor = await findCursor(db);
  const pumpIds = await listPumpIdsChangedSince(db, since, MOST.pumps + 1);
  const runs = await listRunRowsChangedSince(db, since, MOST.runs + 1);
  const alarms = await listAlarmRowsChangedSince(db, since, MOST.alarms + 1);
  if (pumpIds.length > MOST.pumps || runs.length > MOST.runs || alarms.length > MOST.alarms) {
    return { cursor, complete: false, pumps: [], runs: [], alarms: [], serverNow: now };
  }
  const pumps = await listPumpLiveRows(db, pumpIds);
  return {
    cursor,
    complete: true,
    pumps: pumps.map(presentPumpLive),
    runs: runs.map((row) => ({ pumpId: row.pumpId, run: presentRun(row) })),
    alarms: alarms.map((row) => presentAlarm(row, actor, now)),
    serverNow: now,
  };
}

/** The cursor of this moment, for somebody who has yet to read anything. */
export async function listNoChanges({ db, now }: Pick<Asking, 'db' | 'now'>): Promise<Changes> {
  return { cursor: await findCursor(db), complete: true, pumps: [], runs: [], alarms: [], serverNow: now };
}
