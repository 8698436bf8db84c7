import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { RuleLayer, RuleLayers, RuleScope } from '#shared/contract/http/rules.ts';
import { presentCatalogue, presentLayer } from './present-rules.ts';
import { getCompanyRules, listModelRules, listPumpRules, type RuleRow } from './rule-read-model.ts';

const NAMES = { company: 'company', model: 'motor model', pump: 'pump' } as const;

/** What is set for one scope; nothing set is version 0. */
export async function readRules(context: Context, scope: RuleScope): Promise<RuleLayer> {
  const row = await findRow(context, scope);
  if (row === undefined) throw notFound(NAMES[scope.kind]);
  const company = scope.kind === 'company' ? row : await getCompanyRules(context.db, context.actor.companyId);
  return presentLayer(scope, row, company?.rules ?? {});
}

async function findRow({ db, actor: { companyId } }: Context, scope: RuleScope): Promise<RuleRow | undefined> {
  if (scope.kind === 'company') return getCompanyRules(db, companyId);
  if (scope.kind === 'model') return (await listModelRules(db, companyId, scope.modelId))[0];
  return (await listPumpRules(db, companyId, scope.pumpId))[0];
}

/** Everything that is set otherwise than the defaults. */
export async function listRules(context: Context): Promise<RuleLayers> {
  const { db, actor } = context;
  const models = await listModelRules(db, actor.companyId);
  const pumps = await listPumpRules(db, actor.companyId);
  const company = await readRules(context, { kind: 'company' });
  return {
    company,
    models: models.map((row) => presentLayer({ kind: 'model', modelId: row.scopeId }, row, company.rules)),
    pumps: pumps.map((row) => presentLayer({ kind: 'pump', pumpId: row.scopeId }, row, company.rules)),
    catalogue: presentCatalogue(),
  };
}
