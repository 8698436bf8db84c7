import type { RuleLayer, RuleLayers, RuleScope, StoredRules } from '#shared/contract/http/rules.ts';
import { FOLDED_DETECTORS, limitsOfFigure, listFigures } from '#shared/domain/detectors/figure-limits.ts';
import { mergeSettings } from '#shared/domain/detectors/rule-settings.ts';
import type { RuleRow } from './rule-read-model.ts';

/** What is set for one scope. */
export const presentLayer = (scope: RuleScope, row: RuleRow, above: StoredRules): RuleLayer => ({
  scope,
  name: row.name,
  rules: row.rules ?? {},
  inherited: presentMerged(scope.kind === 'company' ? [] : [above, row.modelRules ?? {}]),
  version: row.version ?? 0,
  changedAt: row.changedAt,
  changedBy: row.changedBy,
});

/** Layers of the contract's form make one of it. */
const presentMerged = (layers: readonly StoredRules[]): StoredRules => mergeSettings(...layers) as StoredRules;

/** Every rule with its figures, for a caller that has no copy of them. */
export const presentCatalogue = (): RuleLayers['catalogue'] =>
  FOLDED_DETECTORS.map((detector) => ({
    detector,
    figures: listFigures(detector).map(([name, usual]) => ({ name, usual, ...limitsOfFigure(name) })),
  }));
