import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import { listPumpRows, type PumpRowData } from './pump-row-read-model.ts';

/** One pump the person may see. */
export async function getPumpRow({ db }: Context, pumpId: string): Promise<PumpRowData> {
  const [row] = await listPumpRows(db, [pumpId]);
  if (row === undefined) throw notFound('pump');
  return row;
}
