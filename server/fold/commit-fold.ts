import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';
import { announceAlarms } from '#server/mail/announce-alarms.ts';
import { withdrawMails } from '#server/mail/withdraw-mails.ts';
import type { AlarmChange } from './alarm-change.ts';
import { listNewestStarts, lockOpenAlarms, saveAlarmChanges } from './alarms-repository.ts';
import { applySignals, BACKLOG_AFTER_MS } from './apply-signals.ts';
import { writeFold } from './fold-repository.ts';
import type { FoldWrite } from './fold-write.ts';

export type CommitOptions = {
  readonly pool: pg.Pool;
  readonly epoch: number;
  readonly publicUrl: string;
  readonly now: () => number;
};

export type Committed = {
  /** Pumps that were still ours; of the others nothing was written. */
  readonly written: ReadonlySet<string>;
  readonly alarms: readonly AlarmChange[];
  readonly mails: number;
};

/** Runs, states, alarms and mails of some pumps, in one transaction. */
export async function commitFold(options: CommitOptions, writes: readonly FoldWrite[]): Promise<Committed> {
  const { pool, epoch } = options;
  if (writes.every(({ signals }) => signals.length === 0)) {
    return { written: await writeFold(pool, epoch, writes), alarms: [], mails: 0 };
  }
  return asMachine(pool, async (_db, client) => {
    const written = await writeFold(client, epoch, writes);
    const ours = writes.filter(({ slot, signals }) => signals.length > 0 && written.has(slot.pump.pumpId));
    const alarms = await changeAlarms(client, ours, options.now());
    const mails = await announceAlarms(client, alarms, { publicUrl: options.publicUrl, now: options.now() });
    return { written, alarms, mails };
  });
}

async function changeAlarms(client: pg.PoolClient, writes: readonly FoldWrite[], now: number): Promise<AlarmChange[]> {
  const pumpIds = writes.map(({ slot }) => slot.pump.pumpId);
  const open = await lockOpenAlarms(client, pumpIds);
  const newestStarts = await listNewestStarts(client, pumpIds);
  const pumps = writes.map(({ slot: { pump }, signals }) => ({ ...pump, signals }));
  const changes = applySignals(pumps, { open, newestStarts }, now);
  await withdrawReturned(client, changes, now);
  await saveAlarmChanges(client, changes);
  return changes;
}

/** What returned needs no mail that has not left; one of which none ever left, from a backlog, is history at once. */
async function withdrawReturned(client: pg.PoolClient, changes: readonly AlarmChange[], now: number): Promise<void> {
  const returned = changes.filter(({ record, isNew }) => !record.active && !isNew);
  if (returned.length === 0) return;
  const unheard = await withdrawMails(
    client,
    returned.map(({ alarmId }) => alarmId),
    now,
  );
  for (const change of returned) {
    const { record } = change;
    const isBacklog = now - (record.returnedAt ?? now) > BACKLOG_AFTER_MS;
    if (isBacklog && unheard.has(change.alarmId) && record.state === 'returned')
      change.record = { ...record, state: 'normal' };
  }
}
