import { type SQL, sql } from 'drizzle-orm';
import { instantOfMs } from './epoch-ms.ts';
import type { MarkKind } from './schema/rollup-marks.ts';
import type { Transaction } from './transaction.ts';

/** A stretch of time, ms, and what of it is to be worked out again. */
export type Mark = { readonly kind: MarkKind; readonly from: number; readonly to: number };

/**
 * Asks for a stretch of the past of some pumps `p` to be worked out again, by the worker.
 *
 * @example await markPumps(db, sql`p.id = ${pumpId}`, { kind: 'days', from, to })
 */
export async function markPumps(db: Pick<Transaction, 'execute'>, which: SQL, { kind, from, to }: Mark): Promise<void> {
  await db.execute(sql`
    insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
    select gen_random_uuid(), p.company_id, p.id, ${kind}, ${instantOfMs(from)}, ${instantOfMs(to)} from pumps p where ${which}`);
}

/** The same for one pump. */
export const markPump = (db: Pick<Transaction, 'execute'>, pumpId: string, mark: Mark): Promise<void> =>
  markPumps(db, sql`p.id = ${pumpId}`, mark);

/** Has everything that some pumps used up to now priced and compared anew. */
export const markPrices = (db: Pick<Transaction, 'execute'>, which: SQL, now: number): Promise<void> =>
  markPumps(db, which, { kind: 'prices', from: 0, to: now });
