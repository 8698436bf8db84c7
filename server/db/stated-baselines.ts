import { sql } from 'drizzle-orm';
import { type Baseline, nameplateWatts } from '#shared/domain/energy/savings-baseline.ts';
import type { StatedBaseline } from './schema/baselines.ts';
import type { Transaction } from './transaction.ts';

/** What was stated, as savings reckon with it; undefined where its numbers do not come to watts. */
export function toBaseline(stated: StatedBaseline): Baseline | undefined {
  const { kind, basis, watts, sigmaWatts, horsepower, serviceFactor } = stated;
  if (kind !== 'nameplate')
    return watts === undefined || sigmaWatts === undefined ? undefined : { kind, watts, sigmaWatts, basis };
  const plate =
    horsepower === undefined || serviceFactor === undefined ? undefined : nameplateWatts(horsepower, serviceFactor);
  return plate === undefined ? undefined : { kind, basis, ...plate };
}

/** The baselines of some pumps, by pump. */
export async function listBaselines(
  db: Pick<Transaction, 'execute'>,
  pumpIds: readonly string[],
): Promise<Map<string, Baseline>> {
  const { rows } = await db.execute<{ pumpId: string; stated: StatedBaseline }>(sql`
    select pump_id as "pumpId", stated from baselines
    where pump_id = any(${sql.param(pumpIds)}::uuid[]) and stated is not null`);
  const baselines = new Map<string, Baseline>();
  for (const { pumpId, stated } of rows) {
    const baseline = toBaseline(stated);
    if (baseline !== undefined) baselines.set(pumpId, baseline);
  }
  return baselines;
}
