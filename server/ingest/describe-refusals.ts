import { toStorableText } from './storable-text.ts';

/** What was refused of one message, as a manager reads it. */
export type Refusal = {
  /** How many readings or fields were refused; a message refused whole counts as one. */
  readonly count: number;
  /** The first reason. */
  readonly reason: string;
  /** Every reason with its count. */
  readonly detail: string;
  /** The beginning of what came. */
  readonly sample: string;
};

const SAMPLE_CHARACTERS = 200;

/**
 * Sums up the faults of one message: a device that sends five hundred bad readings is one line, not five hundred.
 *
 * @example describeRefusals([{ reason: 'ahead' }, { reason: 'ahead' }], '[…]').detail // 'ahead (2)'
 */
export function describeRefusals(faults: readonly { readonly reason: string }[], text: string): Refusal {
  const counts = new Map<string, number>();
  for (const { reason } of faults) counts.set(reason, (counts.get(reason) ?? 0) + 1);
  return {
    count: faults.length,
    reason: faults[0]?.reason ?? 'unknown',
    detail: [...counts].map(([reason, count]) => `${reason} (${count})`).join(', '),
    sample: toStorableText(text, SAMPLE_CHARACTERS),
  };
}
