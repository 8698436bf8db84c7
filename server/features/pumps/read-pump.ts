import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { presentPumpDetail } from './present-pump-detail.ts';
import { findPumpDetailRow } from './pump-detail-read-model.ts';

/** One pump with everything its page shows. */
export async function readPump({ db, actor }: Context, pumpId: string): Promise<PumpDetail> {
  const row = await findPumpDetailRow(db, pumpId);
  if (row === undefined) throw notFound('pump');
  return presentPumpDetail(row, actor);
}
