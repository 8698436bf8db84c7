import type { Context } from '#server/context.ts';
import type { PadWithTerms } from '#shared/contract/http/tariffs.ts';
import { listPadTermRows } from './pad-terms-read-model.ts';

/** Pads that do not go by the company's terms. */
export async function listPadsWithTerms({
  db,
  actor,
  now,
}: Context): Promise<{ items: PadWithTerms[]; count: number }> {
  const rows = await listPadTermRows(db, actor.companyId, now);
  return { items: rows.map(({ count: _, ...row }) => row), count: rows[0]?.count ?? 0 };
}
