import { type SQL, sql } from 'drizzle-orm';
import { epochMs } from '#server/db/epoch-ms.ts';
import { isSetAside } from '#server/db/set-aside.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { Detector, Evidence, Priority } from '#shared/domain/detectors/detector.ts';
import type { PumpNow } from '#shared/domain/fold/fold-output.ts';

/** The worst open alarm of a pump, and how many are open. */
export type MarkRow = {
  readonly id: string;
  readonly detector: Detector;
  readonly cause: string;
  readonly evidence: Evidence;
  readonly priority: Priority;
  readonly acknowledged: boolean;
  readonly from: number;
  readonly open: number;
};

/** What changes on a pump's row while one watches; instants in ms. */
export type PumpLiveRow = {
  readonly pumpId: string;
  readonly now: PumpNow | null;
  readonly heardAt: number | null;
  readonly silentSince: number | null;
  readonly alarm: MarkRow | null;
};

const priorityRank = sql`case priority when 'urgent' then 0 when 'soon' then 1 else 2 end`;

/**
 * One row a pump that has an open alarm which calls somebody: neither shelved, suppressed by design nor out of
 * service. The worst, of those the one nobody has seen, of those the oldest. A note waits for a stop and asks nobody to
 * have seen it: it counts as acknowledged.
 */
export const openAlarmMarks = (which: SQL = sql`true`) => sql`
  select distinct on (pump_id) pump_id, id, detector, cause, evidence, priority,
    state = 'acknowledged' or alarm_class = 'note' as acknowledged,
    ${epochMs(sql`from_at`)} as from_ms, (count(*) over (partition by pump_id))::int as open
  from alarms a where state <> 'normal' and not ${isSetAside} and ${which}
  order by pump_id, ${priorityRank}, acknowledged, from_at`;

/** Columns of PumpLiveRow, for a query that joins `pump_states s` and `openAlarmMarks` as `mark`. */
export const liveColumns = sql`
  s.now, ${epochMs(sql`s.heard_at`)} as "heardAt", ${epochMs(sql`s.silent_since`)} as "silentSince",
  case when mark.id is not null then json_build_object('id', mark.id, 'detector', mark.detector, 'cause', mark.cause,
    'evidence', mark.evidence, 'priority', mark.priority, 'acknowledged', mark.acknowledged, 'from', mark.from_ms, 'open', mark.open) end as alarm`;

/** The live part of pumps the person may see, in no order. */
export async function listPumpLiveRows(db: Transaction, pumpIds: readonly string[]): Promise<PumpLiveRow[]> {
  const ids = sql`any(${sql.param(pumpIds)}::uuid[])`;
  const { rows } = await db.execute<PumpLiveRow>(sql`
    select p.id as "pumpId", ${liveColumns}
    from pumps p left join pump_states s on s.pump_id = p.id
    left join (${openAlarmMarks(sql`pump_id = ${ids}`)}) mark on mark.pump_id = p.id
    where p.id = ${ids}`);
  return rows;
}

/** The pumps a homeowner may see, each with the instant (ms) from which on: the day they moved in. */
export async function listOwnedPumps(db: Transaction): Promise<Map<string, number>> {
  const { rows } = await db.execute<{ id: string; since: number }>(sql`
    select p.id, ${epochMs(sql`o.starts_at`)} as since from pumps p join pad_ownerships o on o.pad_id = p.pad_id`);
  return new Map(rows.map(({ id, since }) => [id, since]));
}
