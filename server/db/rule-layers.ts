import { type SQL, sql } from 'drizzle-orm';
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
