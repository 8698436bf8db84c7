import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { toBaseline } from '#server/db/stated-baselines.ts';
import { notFound } from '#server/errors.ts';
import { changedMeanwhile, type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { BaselineShape, PumpBaseline } from '#shared/contract/http/baselines.ts';
import { findBaseline, hasPump, saveBaseline } from './baseline-repository.ts';

/** What a pump used before, as it was stated. */
export async function readBaseline(context: Context, pumpId: string): Promise<PumpBaseline> {
  if (!(await hasPump(context, pumpId))) throw notFound('pump');
  const row = await findBaseline(context, pumpId);
  const baseline = row?.stated ?? null;
  const reckoned = baseline === null ? undefined : toBaseline(baseline);
  return {
    baseline,
    watts: reckoned?.watts ?? null,
    sigmaWatts: reckoned?.sigmaWatts ?? null,
    statedAt: row?.statedAt ?? null,
    statedBy: row?.statedBy ?? null,
    version: row?.version ?? 0,
  };
}

type Statement = {
  readonly pumpId: string;
  readonly baseline: BaselineShape | null;
  readonly ifMatch: ExpectedVersion;
};

/** States what a pump used before, or that nobody knows; its savings are worked out anew. */
export async function stateBaseline(context: Context, { pumpId, baseline, ifMatch }: Statement): Promise<PumpBaseline> {
  const known = await readBaseline(context, pumpId);
  requireVersion(ifMatch, known.version);
  if (!(await saveBaseline(context, pumpId, baseline, known.version))) throw changedMeanwhile();
  await recordAct(context, { action: 'baseline.stated', subjectKind: 'pump', subjectId: pumpId });
  return readBaseline(context, pumpId);
}
