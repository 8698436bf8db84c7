import type pg from 'pg';
import { asMachine } from '#server/db/transaction.ts';
import { announceAlarms } from '#server/mail/announce-alarms.ts';
import { withdrawMails } from '#server/mail/withdraw-mails.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import type { AlarmChange, OpenAlarm } from './alarm-change.ts';
import { listNewestStarts, lockOpenAlarms, saveAlarmChanges } from './alarms-repository.ts';
import { applySignals, BACKLOG_AFTER_MS } from './apply-signals.ts';
import { type Cover, saveCovers } from './areas/area-repository.ts';
import { changeGroupAlarms } from './areas/change-group-alarms.ts';
import { coverAlarms } from './areas/cover-alarms.ts';
import { type AreaOutcome, foldAreas, hasAreaNews } from './areas/fold-areas.ts';
import { writeFold } from './fold-repository.ts';
import type { FoldWrite } from './fold-write.ts';

export type CommitOptions = {
  readonly pool: pg.Pool;
  readonly epoch: number;
  readonly publicUrl: string;
  readonly now: () => number;
  /** See FoldContext. */
  readonly listeningSince: number;
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
  if (!writes.some(hasNews)) {
    return { written: await writeFold(pool, epoch, writes), alarms: [], mails: 0 };
  }
  return asMachine(pool, async (_db, client) => {
    const written = await writeFold(client, epoch, writes);
    const ours = writes.filter((write) => hasNews(write) && written.has(write.slot.pump.pumpId));
    const alarms = await changeAlarms(client, ours, options);
    const mails = await announceAlarms(client, alarms, { publicUrl: options.publicUrl, now: options.now() });
    return { written, alarms, mails };
  });
}

const hasNews = (write: FoldWrite): boolean => write.signals.length > 0 || hasAreaNews(write);

async function changeAlarms(
  client: pg.PoolClient,
  writes: readonly FoldWrite[],
  options: CommitOptions,
): Promise<AlarmChange[]> {
  const now = options.now();
  const areas = await foldAreas(client, writes, { now, listeningSince: options.listeningSince });
  const own = writes.map(({ slot }) => slot.pump.pumpId);
  const pumpIds = [...new Set([...own, ...areas.flatMap((area) => area.pumpIds)])];
  const open = await lockOpenAlarms(client, pumpIds);
  const newestStarts = await listNewestStarts(client, pumpIds);
  const pumps = writes.map(({ slot: { pump }, signals }) => ({ ...pump, signals }));
  const applied = applySignals(pumps, { open, newestStarts }, now);
  const { groups, changes, covers } = await changeGroups(client, areas, { open, changes: applied }, now);
  await withdrawReturned(client, [...groups, ...changes], now);
  await saveAlarmChanges(client, [...groups, ...changes]);
  await saveCovers(client, covers);
  return [...groups, ...changes];
}

type PumpAlarms = { readonly open: readonly OpenAlarm[]; readonly changes: readonly AlarmChange[] };

/** The alarms that speak for several pumps, and what that makes of the pumps' own. */
async function changeGroups(
  client: pg.PoolClient,
  areas: readonly AreaOutcome[],
  { open, changes }: PumpAlarms,
  now: number,
) {
  const groups: AlarmChange[] = [];
  const covers: Cover[] = [];
  let all = changes;
  for (const area of areas) {
    const made = await changeGroupAlarms(client, area, now);
    const covered = coverAlarms(all, open, area, made.groupOf, now);
    groups.push(...made.changes);
    covers.push(...covered.covers);
    all = covered.changes;
  }
  return { groups, changes: all, covers };
}

/**
 * What returned needs no mail that has not left, unless it chatters and waits for a person; one of which none ever left,
 * from a backlog, is history at once.
 */
async function withdrawReturned(client: pg.PoolClient, changes: readonly AlarmChange[], now: number): Promise<void> {
  const isOver = ({ active, state, suppressedBy }: AlarmRecord) =>
    suppressedBy !== null || (!active && state !== 'latched');
  const returned = changes.filter(({ record, isNew }) => !isNew && isOver(record));
  if (returned.length === 0) return;
  const unheard = await withdrawMails(client, { alarmIds: returned.map(({ alarmId }) => alarmId) }, now);
  for (const change of returned) {
    const { record } = change;
    if (record.active) continue;
    const isBacklog = now - (record.returnedAt ?? now) > BACKLOG_AFTER_MS;
    if (isBacklog && unheard.has(change.alarmId) && record.state === 'returned')
      change.record = { ...record, state: 'normal' };
  }
}
