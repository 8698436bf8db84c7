import type { FoldContext } from './fold-context.ts';
import type { PumpSlot } from './pump-slot.ts';

/** From here on a pump's events (`behind`), or its state too (`reload`), are read from the database, not before `at` (ms). */
export function fallBehind(context: FoldContext, slot: PumpSlot, mode: 'behind' | 'reload', at: number): void {
  slot.mode = mode;
  slot.notBefore = at;
  context.catchUpAt = Math.min(context.catchUpAt, at);
}
