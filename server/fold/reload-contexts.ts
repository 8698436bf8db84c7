import type { FoldContext } from './fold-context.ts';

/**
 * Puts pumps under what is commissioned of them now; a pump that is not monitored any more is let go. `pumpIds`
 * undefined = all of ours.
 */
export async function reloadContexts(context: FoldContext, pumpIds: readonly string[] | undefined): Promise<void> {
  const ids = pumpIds ?? context.slots.list().map(({ pump }) => pump.pumpId);
  const pumps = new Map((await context.listPumps(ids)).map((pump) => [pump.pumpId, pump]));
  for (const pumpId of ids) {
    const slot = context.slots.find(pumpId);
    const pump = pumps.get(pumpId);
    if (slot === undefined) continue;
    if (pump === undefined) context.slots.delete(pumpId);
    else {
      slot.pump = pump;
      slot.fold = slot.fold.withContext(pump.context, pump.rules);
    }
  }
}
