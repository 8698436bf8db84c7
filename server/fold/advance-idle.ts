import type { FoldContext } from './fold-context.ts';
import { advanceCursors, takeArrivalNumber } from './fold-repository.ts';

type Mark = { readonly at: number; readonly sequence: number };

/** No statement that stores readings lives this long: whatever has a lower number is stored by then, or never. */
const SETTLED_AFTER_MS = 30_000;
const MARK_EVERY_MS = 30_000;
const ADVANCE_EVERY_MS = 5 * 60_000;

/** Moves the cursors of pumps that say nothing, so that the next start need not search what lies behind them. */
export type IdleAdvance = { readonly run: (context: FoldContext) => Promise<void> };

/** Nothing marked yet. */
export function createIdleAdvance(): IdleAdvance {
  let marks: Mark[] = [];
  let advancedAt = 0;
  return {
    run: async (context) => {
      const now = context.now();
      if (now - (marks.at(-1)?.at ?? 0) >= MARK_EVERY_MS) {
        marks.push({ at: now, sequence: await takeArrivalNumber(context.pool) });
      }
      const settled = marks.findLast(({ at }) => now - at >= SETTLED_AFTER_MS);
      if (settled === undefined || now - advancedAt < ADVANCE_EVERY_MS) return;
      advancedAt = now;
      marks = marks.filter(({ at }) => at >= settled.at);
      await advance(context, settled.sequence);
    },
  };
}

async function advance(context: FoldContext, sequence: number): Promise<void> {
  const idle = context.slots
    .list()
    .filter(({ mode, cursor, lastStored }) => mode === 'live' && lastStored <= cursor && cursor < sequence);
  for (const slot of idle) slot.cursor = sequence;
  if (idle.length === 0) return;
  await advanceCursors(
    context.pool,
    context.epoch,
    idle.map(({ pump }) => pump.pumpId),
    sequence,
  );
}
