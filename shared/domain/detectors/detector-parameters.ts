import type { Priority } from './detector.ts';
import { DETECTOR_DEFAULTS, type DetectorDefaults, type FoldedDetector } from './detector-defaults.data.ts';

/** One rule's figures; units are in the names. */
export type RuleParameters<Name extends FoldedDetector> = { readonly [Key in keyof DetectorDefaults[Name]]: number };

/** Whether a rule speaks at all, and with which usual priority. */
export type RuleChoice = { readonly enabled?: boolean; readonly priority?: Priority };
export type RuleChoices = { readonly [Name in FoldedDetector]?: RuleChoice };

export type DetectorFigures = { readonly [Name in FoldedDetector]: RuleParameters<Name> };

export type DetectorParameters = DetectorFigures & {
  /** Only where somebody chose otherwise. */
  readonly choices?: RuleChoices;
};

/** What a company, a motor model or a pump sets otherwise. */
export type DetectorOverrides = { readonly [Name in FoldedDetector]?: Partial<RuleParameters<Name>> };

/**
 * The figures that hold for one pump: the defaults, then each override in turn, the last one winning. A figure that is
 * unknown, negative or no number is left out.
 *
 * @example resolveParameters({ stopped: { delaySeconds: 600 } }).stopped.delaySeconds // 600
 */
export function resolveParameters(...overrides: readonly (DetectorOverrides | undefined)[]): DetectorFigures {
  const resolved: Record<string, Record<string, number>> = {};
  for (const [name, defaults] of Object.entries(DETECTOR_DEFAULTS)) resolved[name] = { ...defaults };
  for (const override of overrides) {
    for (const [name, figures] of Object.entries(override ?? {})) applyFigures(resolved[name], figures);
  }
  return parseResolved(resolved);
}

function applyFigures(target: Record<string, number> | undefined, figures: object): void {
  if (target === undefined) return;
  for (const [key, value] of Object.entries(figures)) {
    if (key in target && typeof value === 'number' && Number.isFinite(value) && value >= 0) target[key] = value;
  }
}

/** Every name and key comes from the defaults, which is what the type says. */
function parseResolved(resolved: Record<string, Record<string, number>>): DetectorFigures {
  return resolved as DetectorFigures;
}
