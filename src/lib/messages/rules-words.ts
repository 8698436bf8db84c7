import { CATALOGUE } from './catalogue.ts';
import { createWords } from './create-words.ts';
import { RULE_NAMES } from './rule-names.data.ts';
import { RULES_MESSAGES } from './rules.data.ts';

/** `t` of the page about alarm rules. */
export const t = createWords({ ...CATALOGUE, ...RULES_MESSAGES });

const NAMES: Readonly<Record<string, string>> = RULE_NAMES;

/** `lateMinutes` → `late minutes`: a figure that nobody has found words for yet is still readable. */
const inWords = (key: string): string =>
  key
    .replace(/([a-z0-9])([A-Z])/g, '$1 $2')
    .replaceAll('-', ' ')
    .toLowerCase();

export const ruleName = (detector: string): string => NAMES[`rule.${detector}`] ?? inWords(detector);
export const ruleSays = (detector: string): string => NAMES[`rule.${detector}.says`] ?? '';
export const figureName = (figure: string): string => NAMES[`figure.${figure}`] ?? inWords(figure);
