import type { Priority } from './detector.ts';
import type { FoldedDetector } from './detector-defaults.data.ts';
import {
  type DetectorParameters,
  type RuleChoice,
  type RuleChoices,
  type RuleParameters,
  resolveParameters,
} from './detector-parameters.ts';

/** What one rule is set to otherwise than its defaults; what is left out holds as it is. */
export type RuleSetting<Name extends FoldedDetector = FoldedDetector> = {
  /** false = the rule raises nothing; it goes on learning. */
  readonly enabled?: boolean;
  /** Its usual priority; a worse one that the rule finds by itself stays. */
  readonly priority?: Priority;
  readonly figures?: Partial<RuleParameters<Name>>;
};

/** What a company, a motor model or a pump sets otherwise than the defaults. */
export type RuleSettings = { readonly [Name in FoldedDetector]?: RuleSetting<Name> };

/**
 * The rules that hold for one pump: the defaults, then each layer in turn, the last one winning figure by figure.
 *
 * @example resolveRules({ stopped: { enabled: false } }).choices?.stopped?.enabled // false
 */
export function resolveRules(...layers: readonly (RuleSettings | undefined)[]): DetectorParameters {
  const figures = layers.map((layer) =>
    Object.fromEntries(Object.entries(layer ?? {}).map(([name, setting]) => [name, setting.figures ?? {}])),
  );
  const choices: Record<string, RuleChoice> = {};
  for (const layer of layers) {
    for (const [name, { enabled, priority }] of Object.entries(layer ?? {})) {
      const choice = {
        ...choices[name],
        ...(enabled === undefined ? {} : { enabled }),
        ...(priority === undefined ? {} : { priority }),
      };
      if (Object.keys(choice).length > 0) choices[name] = choice;
    }
  }
  const parameters = resolveParameters(...figures);
  return Object.keys(choices).length === 0 ? parameters : { ...parameters, choices: choices satisfies RuleChoices };
}

type AnySetting = {
  readonly enabled?: boolean | undefined;
  readonly priority?: Priority | undefined;
  readonly figures?: object | undefined;
};
type AnySettings = Readonly<Record<string, AnySetting>>;

/**
 * Several layers as one, the last one winning figure by figure; what no layer sets stays unset.
 *
 * @example mergeSettings({ stopped: { enabled: false } }, { stopped: { priority: 'note' } }) // both hold
 */
export function mergeSettings<Settings extends AnySettings>(...layers: readonly Settings[]): AnySettings {
  const merged: Record<string, AnySetting> = {};
  for (const layer of layers) {
    for (const [name, setting] of Object.entries(layer)) {
      const before = merged[name];
      const figures = { ...before?.figures, ...setting.figures };
      merged[name] = { ...before, ...setting, ...(Object.keys(figures).length === 0 ? {} : { figures }) };
    }
  }
  return merged;
}
