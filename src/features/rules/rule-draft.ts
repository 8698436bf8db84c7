import type { StoredRules } from '#shared/contract/http/rules.ts';
import type { Priority } from '#shared/domain/detectors/detector.ts';
import type { FoldedDetector } from '#shared/domain/detectors/detector-defaults.data.ts';
import { FOLDED_DETECTORS, listFigures } from '#shared/domain/detectors/figure-limits.ts';
import type { UnitSystem } from '#shared/units/unit-system.ts';
import { formOfFigure, parseFigure, typedFigure } from './figure-view.ts';

/** One rule as it is being edited: '' = as above; figures as they are typed. */
export type RuleDraft = {
  readonly enabled: '' | 'on' | 'off';
  readonly priority: '' | Priority;
  readonly figures: Readonly<Record<string, string>>;
};

export type Draft = Readonly<Record<FoldedDetector, RuleDraft>>;

const usualOf = (detector: FoldedDetector): ReadonlyMap<string, number> => new Map(listFigures(detector));

function draftOfRule(detector: FoldedDetector, rules: StoredRules, system: UnitSystem): RuleDraft {
  const { enabled, priority, figures = {} } = rules[detector] ?? {};
  const usual = usualOf(detector);
  const known = Object.entries(figures).flatMap(([name, value]) => {
    const ofRule = usual.get(name);
    return ofRule === undefined ? [] : [[name, typedFigure(value, formOfFigure(name, ofRule, system))] as const];
  });
  return {
    enabled: enabled === undefined ? '' : enabled ? 'on' : 'off',
    priority: priority ?? '',
    figures: Object.fromEntries(known),
  };
}

/** What is set, ready to be edited in the reader's units. */
export const draftOf = (rules: StoredRules, system: UnitSystem): Draft =>
  Object.fromEntries(FOLDED_DETECTORS.map((detector) => [detector, draftOfRule(detector, rules, system)])) as Draft;

/** What a draft sets; undefined where something in it cannot be. A figure that was emptied holds as above. */
export function settingsOf(draft: Draft, system: UnitSystem): StoredRules | undefined {
  const settings: StoredRules = {};
  for (const detector of FOLDED_DETECTORS) {
    const { enabled, priority, figures } = draft[detector];
    const usual = usualOf(detector);
    const parsed: Record<string, number> = {};
    for (const [name, text] of Object.entries(figures)) {
      if (text.trim() === '') continue;
      const value = parseFigure(text, formOfFigure(name, usual.get(name) ?? 0, system));
      if (value === undefined) return undefined;
      parsed[name] = value;
    }
    const setting = {
      ...(enabled === '' ? {} : { enabled: enabled === 'on' }),
      ...(priority === '' ? {} : { priority }),
      ...(Object.keys(parsed).length === 0 ? {} : { figures: parsed }),
    };
    if (Object.keys(setting).length > 0) settings[detector] = setting;
  }
  return settings;
}

/** How many things one rule's draft sets. */
export const countSet = ({ enabled, priority, figures }: RuleDraft): number =>
  Number(enabled !== '') + Number(priority !== '') + Object.values(figures).filter((text) => text.trim() !== '').length;

/** In how many places two drafts differ. */
export function countDifferences(one: Draft, other: Draft): number {
  let count = 0;
  for (const detector of FOLDED_DETECTORS) {
    const [left, right] = [one[detector], other[detector]];
    if (left.enabled !== right.enabled) count += 1;
    if (left.priority !== right.priority) count += 1;
    const names = new Set([...Object.keys(left.figures), ...Object.keys(right.figures)]);
    for (const name of names) if ((left.figures[name] ?? '').trim() !== (right.figures[name] ?? '').trim()) count += 1;
  }
  return count;
}
