import { and, eq, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import { recordAct } from '#server/db/record-act.ts';
import { baselines, type StatedBaseline } from '#server/db/schema/baselines.ts';
import { pumps } from '#server/db/schema/pumps.ts';
import { toBaseline } from '#server/db/stated-baselines.ts';
import { notFound } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { BaselineShape, PumpBaseline } from '#shared/contract/http/baselines.ts';

type BaselineRow = {
  readonly stated: BaselineShape | null;
  readonly statedAt: number;
  readonly statedBy: string | null;
  readonly version: number;
};

/** What a pump used before, as it was stated. */
export async function readBaseline({ db, actor }: Context, pumpId: string): Promise<PumpBaseline> {
  const known = await db.$count(pumps, and(eq(pumps.companyId, actor.companyId), eq(pumps.id, pumpId)));
  if (known === 0) throw notFound('pump');
  const { rows } = await db.execute<BaselineRow>(sql`
    select b.stated, ${epochMs(sql`b.stated_at`)} as "statedAt", u.name as "statedBy", b.version
    from baselines b left join users u on u.id = b.stated_by where b.pump_id = ${pumpId}`);
  const [row] = rows;
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
  const { db, actor, now } = context;
  const known = await readBaseline(context, pumpId);
  requireVersion(ifMatch, known.version);
  const stated: StatedBaseline | null = baseline;
  const said = { stated, statedAt: new Date(now), statedBy: actor.userId };
  const written = await db
    .insert(baselines)
    .values({ pumpId, companyId: actor.companyId, ...said })
    .onConflictDoUpdate({
      target: baselines.pumpId,
      set: { ...said, version: known.version + 1 },
      setWhere: eq(baselines.version, known.version),
    })
    .returning({ version: baselines.version });
  if (written.length === 0) requireVersion(known.version, -1);
  await db.execute(sql`
    insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
    values (gen_random_uuid(), ${actor.companyId}, ${pumpId}, 'prices', 'epoch'::timestamptz, ${instantOfMs(now)})`);
  await recordAct(context, { action: 'baseline.stated', subjectKind: 'pump', subjectId: pumpId });
  return readBaseline(context, pumpId);
}
