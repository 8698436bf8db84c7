import { type SQL, sql } from 'drizzle-orm';
import type { RuleScope } from '#shared/contract/http/rules.ts';
import type { DetectorParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { type RuleSettings, resolveRules } from '#shared/domain/detectors/rule-settings.ts';
import type { Transaction } from './transaction.ts';

/** What is set for a company (neither id), a motor model or a pump. */
export type StoredLayer = {
  readonly companyId: string;
  readonly modelId: string | null;
  readonly pumpId: string | null;
  readonly rules: RuleSettings;
};

/** Whose rules are asked for. */
export type RuledPump = { readonly companyId: string; readonly modelId: string | null; readonly pumpId: string };

/** Everything that is set, of one company or of all. */
export async function listRuleLayers(
  db: Pick<Transaction, 'execute'>,
  companyId?: string,
): Promise<readonly StoredLayer[]> {
  const which: SQL = companyId === undefined ? sql`true` : sql`company_id = ${companyId}`;
  const { rows } = await db.execute<StoredLayer>(
    sql`select company_id as "companyId", model_id as "modelId", pump_id as "pumpId", rules from rule_settings where ${which}`,
  );
  return rows;
}

/** Where what is set for a scope stands among the layers: the company's has neither id. */
export const layerOf = (scope: RuleScope): Pick<StoredLayer, 'modelId' | 'pumpId'> => ({
  modelId: scope.kind === 'model' ? scope.modelId : null,
  pumpId: scope.kind === 'pump' ? scope.pumpId : null,
});

/** Watched pumps `p` that a scope reaches: a model's by the motor that is fitted now. */
export function isInScope(scope: RuleScope): SQL {
  if (scope.kind === 'company') return sql`p.monitored`;
  if (scope.kind === 'pump') return sql`p.monitored and p.id = ${scope.pumpId}`;
  return sql`p.monitored and exists (select from motor_fittings f join motors m on m.id = f.motor_id
    where f.pump_id = p.id and m.model_id = ${scope.modelId}
      and f.starts_at <= now() and (f.ends_at is null or f.ends_at > now()))`;
}

const keyOf = (companyId: string, modelId: string | null, pumpId: string | null): string =>
  `${companyId} ${modelId ?? ''} ${pumpId ?? ''}`;

/**
 * Answers the rules that hold for a pump: the company's over the defaults, the motor model's over these, the pump's own
 * over all. Pumps with the same layers share one answer.
 */
export function createRuleBook(layers: readonly StoredLayer[]): (pump: RuledPump) => DetectorParameters {
  const byKey = new Map(layers.map((layer) => [keyOf(layer.companyId, layer.modelId, layer.pumpId), layer.rules]));
  const resolved = new Map<string, DetectorParameters>();
  return ({ companyId, modelId, pumpId }) => {
    const own = byKey.get(keyOf(companyId, null, pumpId));
    const key = keyOf(companyId, modelId, own === undefined ? null : pumpId);
    const known = resolved.get(key);
    if (known !== undefined) return known;
    const ofModel = modelId === null ? undefined : byKey.get(keyOf(companyId, modelId, null));
    const parameters = resolveRules(byKey.get(keyOf(companyId, null, null)), ofModel, own);
    resolved.set(key, parameters);
    return parameters;
  };
}
