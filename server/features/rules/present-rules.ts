import type { RuleLayer, RuleLayers, RuleScope } from '#shared/contract/http/rules.ts';
import { FOLDED_DETECTORS, limitsOfFigure, listFigures } from '#shared/domain/detectors/figure-limits.ts';
import type { RuleRow } from './rule-read-model.ts';

/** What is set for one scope. */
export const presentLayer = (scope: RuleScope, row: RuleRow): RuleLayer => ({
  scope,
  name: row.name,
  rules: row.rules ?? {},
  version: row.version ?? 0,
  changedAt: row.changedAt,
  changedBy: row.changedBy,
});

/** Every rule with its figures, for a caller that has no copy of them. */
export const presentCatalogue = (): RuleLayers['catalogue'] =>
  FOLDED_DETECTORS.map((detector) => ({
    detector,
    figures: listFigures(detector).map(([name, usual]) => ({ name, usual, ...limitsOfFigure(name) })),
  }));
