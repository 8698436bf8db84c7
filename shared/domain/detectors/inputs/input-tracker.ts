import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { InputFacts } from './input-facts.ts';

/** Follows the edges of one pump's speed inputs. */
export type InputTracker = {
  readonly facts: InputFacts;
  readonly read: (closed: number, before: number | undefined, gap: boolean) => void;
};

/**
 * A tracker of inputs; the mask of the reading before is the fold's to keep.
 *
 * @example createInputTracker(context).facts.wired // 0b011
 */
export function createInputTracker(context: PumpContext): InputTracker {
  const facts: InputFacts = { wired: wiredMask(context), closedEdges: 0, openedEdges: 0 };
  return {
    facts,
    read: (closed, before, gap) => {
      const known = before !== undefined && !gap;
      facts.closedEdges = known ? closed & ~before : 0;
      facts.openedEdges = known ? before & ~closed : 0;
    },
  };
}

/** The inputs that have a speed, as a mask. */
export function wiredMask({ settings, traits }: PumpContext): number {
  let mask = 0;
  settings.inputs.slice(0, traits.inputCount).forEach((rpm, index) => {
    if (rpm !== null) mask |= 1 << index;
  });
  return mask;
}
