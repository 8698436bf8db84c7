import type { Context } from '#server/context.ts';
import { toPumpContext } from '#server/db/commissioned-pumps.ts';
import type { Strip } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { planAhead } from './plan-ahead.ts';
import { listPlanKnowledge } from './plan-knowledge-read-model.ts';
import { presentRun } from './present-run.ts';
import { listPumpRows } from './pump-row-read-model.ts';
import { listRunRows } from './run-read-model.ts';

type Asked = { readonly pumps: readonly string[]; readonly from: number; readonly until: number };

/** Runs of several pumps in one window, in the order asked for; pumps the person may not see are left out. */
export async function listStrips({ db, now }: Context, { pumps, ...window }: Asked) {
  const rows = new Map((await listPumpRows(db, pumps)).map((row) => [row.pumpId, row]));
  const runs = new Map<string, Run[]>();
  for (const run of await listRunRows(db, [...rows.keys()], window)) {
    const before = runs.get(run.pumpId);
    if (before === undefined) runs.set(run.pumpId, [presentRun(run)]);
    else before.push(presentRun(run));
  }
  const known = await listPlanKnowledge(db, [...rows.keys()]);
  const strips = pumps.flatMap((pumpId): Strip[] => {
    const row = rows.get(pumpId);
    if (row === undefined) return [];
    const planned = planAhead({ context: toPumpContext(row), known: known.get(pumpId) }, window, now);
    return [{ pumpId, runs: runs.get(pumpId) ?? [], planned }];
  });
  return { strips, serverNow: now };
}
