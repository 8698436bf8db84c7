import type { Because } from '#shared/domain/control/decision.ts';
import { SOURCES, type Source } from '#shared/domain/readings/reading.ts';

type Loose = Readonly<Record<string, unknown>>;

const numberOf = (value: unknown): number => (typeof value === 'number' ? value : 0);
const sourceOf = (value: unknown): Source => SOURCES.find((source) => source === value) ?? 'off';

const PARSERS: Readonly<Record<Because['kind'], (loose: Loose) => Because>> = {
  input: ({ input, others }) => ({
    kind: 'input',
    input: numberOf(input),
    others: Array.isArray(others) ? others.filter((other): other is number => typeof other === 'number') : [],
  }),
  program: ({ entry, fromMinute, toMinute }) => ({
    kind: 'program',
    entry: numberOf(entry),
    fromMinute: numberOf(fromMinute),
    toMinute: numberOf(toMinute),
  }),
  prime: ({ endsAt, next }) => ({ kind: 'prime', endsAt: numberOf(endsAt), next: sourceOf(next) }),
  timed: ({ endsAt }) => ({ kind: 'timed', endsAt: numberOf(endsAt) }),
  keypad: () => ({ kind: 'keypad' }),
  stop: () => ({ kind: 'stop' }),
  freeze: () => ({ kind: 'freeze' }),
  off: () => ({ kind: 'off' }),
  fault: ({ code }) => ({ kind: 'fault', code: typeof code === 'string' ? code : undefined }),
  unknown: () => ({ kind: 'unknown' }),
  'no-data': () => ({ kind: 'no-data' }),
};

const isKind = (kind: string): kind is Because['kind'] => Object.hasOwn(PARSERS, kind);

/**
 * The reason of a decision as it comes over the wire; a kind that this page does not know yet is `unknown`.
 *
 * @example parseBecause({ kind: 'input', input: 1, others: [2] }) // the same, typed
 */
export function parseBecause(loose: Loose & { readonly kind: string }): Because {
  return isKind(loose.kind) ? PARSERS[loose.kind](loose) : { kind: 'unknown' };
}
