import type { Facts } from './facts.ts';

/** What overheats, gases off or doses on without flow, the worst first. */
const NEEDS_FLOW = ['heater', 'cell', 'feeder'] as const;

/**
 * The equipment that a closed input's clock also feeds and that has no flow interlock of its own, the worst first.
 * An interlock nobody recorded is a question for the next stop, never an alarm.
 *
 * @example listEnergized(facts) // ['heater']
 */
export function listEnergized({ context, reading }: Pick<Facts, 'context' | 'reading'>): readonly string[] {
  if (reading.closedInputs === 0 || context.equipment.length === 0) return [];
  return NEEDS_FLOW.filter((kind) =>
    context.equipment.some(
      ({ kind: is, input, interlock }) =>
        is === kind && interlock === 'none' && input !== undefined && (reading.closedInputs & (1 << (input - 1))) !== 0,
    ),
  );
}
