import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { isInScope, layerOf } from '#server/db/rule-layers.ts';
import { ruleSettings } from '#server/db/schema/rule-settings.ts';
import type { RuleScope } from '#shared/contract/http/rules.ts';
import type { RuleSettings } from '#shared/domain/detectors/rule-settings.ts';

/** The version of what is set for a scope, locked; 0 = nothing was ever set. */
export async function lockRules({ db, actor }: Context, scope: RuleScope): Promise<number> {
  const { modelId, pumpId } = layerOf(scope);
  const [row] = await db
    .select({ version: ruleSettings.version })
    .from(ruleSettings)
    .where(
      and(
        eq(ruleSettings.companyId, actor.companyId),
        modelId === null ? isNull(ruleSettings.modelId) : eq(ruleSettings.modelId, modelId),
        pumpId === null ? isNull(ruleSettings.pumpId) : eq(ruleSettings.pumpId, pumpId),
      ),
    )
    .for('update');
  return row?.version ?? 0;
}

/** Sets the rules of a scope in place of what stood there; false where somebody else set them first meanwhile. */
export async function saveRules(
  { db, actor, now }: Context,
  scope: RuleScope,
  rules: RuleSettings,
  version: number,
): Promise<boolean> {
  const values = {
    ...{ id: newId(), companyId: actor.companyId, ...layerOf(scope), rules },
    ...{ version: version + 1, changedAt: new Date(now), changedBy: actor.userId },
  };
  const { companyId, modelId, pumpId } = ruleSettings;
  const saved = await db
    .insert(ruleSettings)
    .values(values)
    .onConflictDoUpdate({
      target: [companyId, modelId, pumpId],
      set: { rules, version: values.version, changedAt: values.changedAt, changedBy: values.changedBy },
      setWhere: eq(ruleSettings.version, version),
    })
    .returning({ id: ruleSettings.id });
  return saved.length > 0;
}

/** A NOTIFY takes 7999 bytes. */
const IDS_A_RING = 200;

/** Tells whoever folds pumps that those of a scope have other rules now. */
export async function ringForScope({ db, actor }: Context, scope: RuleScope): Promise<void> {
  await db.execute(sql`
    select pg_notify('millrace_context', string_agg(id::text, ','))
    from (select p.id, (row_number() over (order by p.id) - 1) / ${IDS_A_RING} as part from pumps p
      where p.company_id = ${actor.companyId} and ${isInScope(scope)}) ruled
    group by part`);
}
