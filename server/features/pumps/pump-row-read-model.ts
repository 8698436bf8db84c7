import { type SQL, sql } from 'drizzle-orm';
import { type CommissionedRow, commissionedColumns, commissionedFrom } from '#server/db/commissioned-pumps.ts';
import type { Transaction } from '#server/db/transaction.ts';
import { liveColumns, openAlarmMarks, type PumpLiveRow } from './pump-live-read-model.ts';

/** A pump as commissioned, this instant, with the names a screen shows. */
export type PumpRowData = CommissionedRow &
  PumpLiveRow & {
    readonly padName: string;
    readonly pumpName: string;
    readonly customerName: string | null;
    readonly motorModel: string | null;
  };

export const pumpRowColumns = sql`${commissionedColumns}, ${liveColumns}, pad.name as "padName", p.name as "pumpName",
  customer.name as "customerName", model.name as "motorModel"`;

export const pumpRowFrom = (which: SQL) => sql`${commissionedFrom}
  left join pad_ownerships owned on owned.pad_id = p.pad_id
    and owned.starts_at <= now() and (owned.ends_at is null or owned.ends_at > now())
  left join customers customer on customer.id = owned.customer_id
  left join pump_states s on s.pump_id = p.id
  left join (${openAlarmMarks(which)}) mark on mark.pump_id = p.id`;

/** Rows of pumps the person may see, in no order. */
export async function listPumpRows(db: Transaction, pumpIds: readonly string[]): Promise<PumpRowData[]> {
  const ids = sql`any(${sql.param(pumpIds)}::uuid[])`;
  const { rows } = await db.execute<PumpRowData>(
    sql`select ${pumpRowColumns} from ${pumpRowFrom(sql`pump_id = ${ids}`)} where p.id = ${ids}`,
  );
  return rows;
}
