import type { FoldContext } from './fold-context.ts';
import { type FoldWrite, takeFoldWrite } from './fold-write.ts';
import { tickSlot } from './pump-slot.ts';
import { quarantine, saveWrites } from './save-touched.ts';

/** A pump that was heard within this time needs no telling that time passes, ms. */
const HEARD_LATELY_MS = 60_000;

/**
 * Advances the time of pumps that have nothing to say, by the server's clock: silence is judged by arrival. Only what
 * changed something is stored.
 */
export async function tickPumps(context: FoldContext): Promise<void> {
  const now = context.now();
  const writes: FoldWrite[] = [];
  for (const slot of context.slots.list()) {
    if (slot.mode !== 'live' || now - (slot.heardAt ?? 0) < HEARD_LATELY_MS) continue;
    try {
      const wentSilent = tickSlot(slot, now, context.listeningSince);
      const output = slot.fold.take();
      const isNews = wentSilent || slot.isStateOld || output.signals.length > 0 || output.runs.length > 0;
      if (isNews) writes.push(takeFoldWrite(slot, now, { output, whole: true }));
    } catch (error) {
      await quarantine(context, slot, error);
    }
  }
  await saveWrites(context, writes);
}
