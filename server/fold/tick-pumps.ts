import { STAYED_AWAY_MS } from '#shared/domain/fold/area/own-link.ts';
import type { FoldContext } from './fold-context.ts';
import { type FoldWrite, takeFoldWrite } from './fold-write.ts';
import { type PumpSlot, tickSlot } from './pump-slot.ts';
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
  // What is behind may have come back long ago: drops are weighed when all is read.
  const isAllRead = context.slots.list().every(({ mode }) => mode === 'live' || mode === 'set-aside');
  for (const slot of context.slots.list()) {
    if (slot.mode !== 'live' || now - (slot.heardAt ?? 0) < HEARD_LATELY_MS) continue;
    try {
      const wentSilent = tickSlot(slot, now, context.listeningSince);
      const output = slot.fold.take();
      const stayedAway = isAllRead && hasStayedAway(slot, now, context.listeningSince);
      const isNews = wentSilent || stayedAway || slot.isStateOld || output.signals.length > 0 || output.runs.length > 0;
      if (isNews) writes.push(takeFoldWrite(slot, now, { output, whole: true, stayedAway }));
    } catch (error) {
      await quarantine(context, slot, error);
    }
  }
  await saveWrites(context, writes);
}

/** A drop is weighed once, when it has lasted; what dropped before we listened never is. */
function hasStayedAway({ fold, weighedLostAt }: PumpSlot, now: number, listeningSince: number): boolean {
  const lostAt = fold.lostAt();
  if (lostAt === undefined || lostAt === weighedLostAt || lostAt < listeningSince) return false;
  return now - lostAt >= STAYED_AWAY_MS;
}
