import type { Refusal } from './refusal.ts';

export type NumberFault = 'not-finite' | 'too-small' | 'too-large' | 'not-whole';

/** What a number may be. Bounds are included; `above` is a bound that is not. */
export type NumberRule = {
  readonly field: string;
  readonly unit: string;
  readonly least?: number;
  readonly above?: number;
  readonly most?: number;
  readonly whole?: boolean;
};

const allowedRange = ({ unit, least, above, most, whole }: NumberRule): string => {
  const from = least !== undefined ? `from ${least}` : above !== undefined ? `above ${above}` : undefined;
  const to = most !== undefined ? `up to ${most}` : undefined;
  const kind = whole === true ? 'a whole number' : 'a finite number';
  return [kind, from, to, unit].filter((part) => part !== undefined && part !== '').join(' ');
};

const findFault = (value: unknown, rule: NumberRule): NumberFault | undefined => {
  if (typeof value !== 'number' || !Number.isFinite(value)) return 'not-finite';
  if (rule.least !== undefined && value < rule.least) return 'too-small';
  if (rule.above !== undefined && value <= rule.above) return 'too-small';
  if (rule.most !== undefined && value > rule.most) return 'too-large';
  return rule.whole === true && !Number.isInteger(value) ? 'not-whole' : undefined;
};

/**
 * The faults of one number: none, or one that names the field and what it may be. Anything that is not a finite
 * number (NaN, Infinity, text) is `not-finite`.
 *
 * @example checkNumber(-1, { field: 'watts', unit: 'W', least: 0 })
 * // [{ reason: 'too-small', field: 'watts', allowed: 'a finite number from 0 W' }]
 */
export function checkNumber(value: unknown, rule: NumberRule): Refusal<NumberFault>[] {
  const reason = findFault(value, rule);
  return reason === undefined ? [] : [{ reason, field: rule.field, allowed: allowedRange(rule) }];
}

/** The faults of several numbers, in the order given. @example checkNumbers([[1, { field: 'gpm', unit: 'gpm' }]]) // [] */
export const checkNumbers = (numbers: readonly (readonly [unknown, NumberRule])[]): Refusal<NumberFault>[] =>
  numbers.flatMap(([value, rule]) => checkNumber(value, rule));
