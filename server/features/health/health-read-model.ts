import { sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';

export type MailQueue = { readonly oldestSeconds: number | null; readonly lastError: string | null };

/** How long the oldest mail that is due has waited, and what went wrong with it. */
export async function findMailQueue(machineDb: Transaction): Promise<MailQueue> {
  const { rows } = await machineDb.execute<MailQueue>(sql`
    select greatest(0, extract(epoch from now() - due_at))::float8 as "oldestSeconds", last_error as "lastError"
    from outbox_mails where sent_at is null and failed_at is null and due_at <= now() order by due_at limit 1`);
  return rows[0] ?? { oldestSeconds: null, lastError: null };
}
