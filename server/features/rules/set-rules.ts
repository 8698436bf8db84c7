import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { changedMeanwhile, type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { RuleLayer, RuleScope } from '#shared/contract/http/rules.ts';
import type { RuleSettings } from '#shared/domain/detectors/rule-settings.ts';
import { readRules } from './read-rules.ts';
import { lockRules, ringForScope, saveRules } from './rule-repository.ts';

type Change = { readonly scope: RuleScope; readonly rules: RuleSettings; readonly ifMatch: ExpectedVersion };

/** Sets what a company, a motor model or a pump has otherwise, in place of what stood there; it holds at once. */
export async function setRules(context: Context, { scope, rules, ifMatch }: Change): Promise<RuleLayer> {
  const before = await readRules(context, scope);
  const version = await lockRules(context, scope);
  requireVersion(ifMatch, version);
  const kept = withoutEmpty(rules);
  // Somebody who set the first rules of this scope a moment ago was not locked out by a row.
  if (!(await saveRules(context, scope, kept, version))) throw changedMeanwhile();
  const subjectId =
    scope.kind === 'pump' ? scope.pumpId : scope.kind === 'model' ? scope.modelId : context.actor.companyId;
  await recordAct(context, {
    action: 'rules.set',
    subjectKind: scope.kind === 'model' ? 'motor-model' : scope.kind,
    subjectId,
    detail: { before: JSON.stringify(before.rules), after: JSON.stringify(kept) },
  });
  await ringForScope(context, scope);
  return readRules(context, scope);
}

/** A rule of which nothing is set is left out. */
function withoutEmpty(rules: RuleSettings): RuleSettings {
  const entries = Object.entries(rules).flatMap(([detector, { enabled, priority, figures = {} }]) => {
    const setting = {
      ...(enabled === undefined ? {} : { enabled }),
      ...(priority === undefined ? {} : { priority }),
      ...(Object.keys(figures).length === 0 ? {} : { figures }),
    };
    return Object.keys(setting).length === 0 ? [] : [[detector, setting] as const];
  });
  return Object.fromEntries(entries);
}
