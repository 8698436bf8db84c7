import { sql } from 'drizzle-orm';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { RunSource } from '#shared/domain/readings/reading.ts';
import type { RunFlag } from '#shared/domain/runs/run.ts';

/** A run as it is stored; instants in ms. */
export type RunRow = {
  readonly pumpId: string;
  readonly from: number;
  readonly to: number | null;
  readonly source: RunSource;
  readonly expectedSource: RunSource;
  readonly closedInputs: number;
  readonly activeInput: number;
  readonly expectedRpm: number;
  readonly meanRpm: number;
  readonly meanWatts: number;
  readonly wattHours: number;
  readonly coveredMs: number;
  readonly gallons: number | null;
  readonly flags: RunFlag[];
};

export const runColumns = sql`
  r.pump_id as "pumpId", ${epochMs(sql`r.from_at`)} as "from", ${epochMs(sql`r.to_at`)} as "to", r.source,
  r.expected_source as "expectedSource", r.closed_inputs as "closedInputs", r.active_input as "activeInput",
  r.expected_rpm as "expectedRpm", r.mean_rpm as "meanRpm", r.mean_watts as "meanWatts", r.watt_hours as "wattHours",
  r.covered_ms::float8 as "coveredMs", r.gallons, r.flags`;

/**
 * Runs of some pumps that lie in a window, half-open, in order. Runs of a pump follow one another, so the first is the
 * last one that began before the window; from there the key's order does the rest, however long the history.
 */
export async function listRunRows(
  db: Transaction,
  pumpIds: readonly string[],
  window: { readonly from: number; readonly until: number },
): Promise<RunRow[]> {
  const { rows } = await db.execute<RunRow>(sql`
    select ${runColumns}
    from unnest(${sql.param(pumpIds)}::uuid[]) as asked(pump_id)
    cross join lateral (
      select * from runs
      where runs.pump_id = asked.pump_id and runs.from_at < ${instantOfMs(window.until)}
        and runs.from_at >= coalesce((select max(before.from_at) from runs before
          where before.pump_id = asked.pump_id and before.from_at <= ${instantOfMs(window.from)}), '-infinity')
        and (runs.to_at is null or runs.to_at > ${instantOfMs(window.from)})
    ) r
    order by r.pump_id, r.from_at`);
  return rows;
}

/** Runs changed by a transaction that an earlier snapshot had not seen, at most `limit`. */
export async function listRunRowsChangedSince(db: Transaction, cursor: string, limit: number): Promise<RunRow[]> {
  const { rows } = await db.execute<RunRow>(
    sql`select ${runColumns} from runs r where r.changed_in >= ${cursor}::xid8 order by r.changed_in limit ${limit}`,
  );
  return rows;
}
