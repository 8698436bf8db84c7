import { and, eq, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { epochMs } from '#server/db/epoch-ms.ts';
import { markPrices } from '#server/db/rollup-marks.ts';
import { baselines } from '#server/db/schema/baselines.ts';
import { pumps } from '#server/db/schema/pumps.ts';
import type { BaselineShape } from '#shared/contract/http/baselines.ts';

export type BaselineRow = {
  readonly stated: BaselineShape | null;
  readonly statedAt: number;
  readonly statedBy: string | null;
  readonly version: number;
};

/** Whether the company has this pump. */
export const hasPump = async ({ db, actor }: Context, pumpId: string): Promise<boolean> =>
  (await db.$count(pumps, and(eq(pumps.companyId, actor.companyId), eq(pumps.id, pumpId)))) > 0;

/** What was stated of a pump; undefined where nothing ever was. */
export async function findBaseline({ db }: Context, pumpId: string): Promise<BaselineRow | undefined> {
  const { rows } = await db.execute<BaselineRow>(sql`
    select b.stated, ${epochMs(sql`b.stated_at`)} as "statedAt", u.name as "statedBy", b.version
    from baselines b left join users u on u.id = b.stated_by where b.pump_id = ${pumpId}`);
  return rows[0];
}

/** States a baseline over the version that was read, and has the savings worked out anew; false where another came first. */
export async function saveBaseline(
  { db, actor, now }: Context,
  pumpId: string,
  stated: BaselineShape | null,
  version: number,
): Promise<boolean> {
  const said = { stated, statedAt: new Date(now), statedBy: actor.userId };
  const written = await db
    .insert(baselines)
    .values({ pumpId, companyId: actor.companyId, ...said })
    .onConflictDoUpdate({
      target: baselines.pumpId,
      set: { ...said, version: version + 1 },
      setWhere: eq(baselines.version, version),
    })
    .returning({ version: baselines.version });
  if (written.length === 0) return false;
  await markPrices(db, sql`p.company_id = ${actor.companyId} and p.id = ${pumpId}`, now);
  return true;
}
