import type { Context } from '#server/context.ts';
import { toPumpContext } from '#server/db/commissioned-pumps.ts';
import { getPumpRow } from './get-pump-row.ts';
import { planAhead } from './plan-ahead.ts';
import { listPlanKnowledge } from './plan-knowledge-read-model.ts';
import { presentRun } from './present-run.ts';
import { listRunRows } from './run-read-model.ts';

type Asked = { readonly pumpId: string; readonly from: number; readonly until: number };

/** Runs of one pump in a window, and those planned ahead of now. */
export async function listRuns(context: Context, { pumpId, ...window }: Asked) {
  const pump = await getPumpRow(context, pumpId);
  const rows = await listRunRows(context.db, [pumpId], window);
  const known = (await listPlanKnowledge(context.db, [pumpId])).get(pumpId);
  const planned = planAhead({ context: toPumpContext(pump), known }, window, context.now);
  return { runs: rows.map(presentRun), planned };
}
