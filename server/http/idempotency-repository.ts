import { and, eq } from 'drizzle-orm';
import { idempotencyKeys } from '#server/db/schema/idempotency-keys.ts';
import type { Transaction } from '#server/db/transaction.ts';

type Owner = { readonly companyId: string; readonly userId: string; readonly key: string };

const isKey = ({ userId, key }: Owner) => and(eq(idempotencyKeys.userId, userId), eq(idempotencyKeys.key, key));

/**
 * Takes a key for this transaction; false when it was taken before. While another request with the same key is still
 * at work, this waits for its end.
 */
export async function takeKey(db: Transaction, owner: Owner, requestHash: Buffer): Promise<boolean> {
  const rows = await db
    .insert(idempotencyKeys)
    .values({ ...owner, requestHash })
    .onConflictDoNothing()
    .returning({ key: idempotencyKeys.key });
  return rows.length > 0;
}

export async function keepAnswer(
  db: Transaction,
  owner: Owner,
  answer: { status: number; sealed: Buffer },
): Promise<void> {
  await db.update(idempotencyKeys).set({ status: answer.status, sealedAnswer: answer.sealed }).where(isKey(owner));
}

export async function findAnswer(db: Transaction, owner: Owner) {
  const [row] = await db
    .select({
      requestHash: idempotencyKeys.requestHash,
      status: idempotencyKeys.status,
      sealedAnswer: idempotencyKeys.sealedAnswer,
    })
    .from(idempotencyKeys)
    .where(isKey(owner));
  return row;
}
