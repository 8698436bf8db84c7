import type { StoredMessage } from '#server/ingest/stored-message.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { eventsOfMessage } from './events-of-message.ts';
import type { FoldContext } from './fold-context.ts';
import { feedSlot, type PumpSlot } from './pump-slot.ts';
import { quarantine, saveTouched } from './save-touched.ts';

/** Readings that are folded before the event loop gets its turn. */
const EVENTS_A_TURN = 400;

/** Folds messages that were stored a moment ago, and commits what came of them in one transaction. */
export async function foldMessages(context: FoldContext, messages: readonly StoredMessage[]): Promise<void> {
  const touched = new Set<PumpSlot>();
  let fed = 0;
  for (const message of messages) {
    // Folding must not keep what arrives meanwhile from being acknowledged.
    if (fed >= EVENTS_A_TURN) await new Promise((resolve) => setImmediate(resolve));
    fed = fed >= EVENTS_A_TURN ? 0 : fed + Math.max(1, message.readings.length);
    const slot = context.slots.find(message.pumpId);
    // What is behind reads this message from the database, in its turn.
    if (slot === undefined || slot.mode !== 'live' || message.sequence <= slot.cursor) continue;
    if (await feedAll(context, slot, eventsOfMessage(message), message.sequence)) touched.add(slot);
  }
  await saveTouched(context, touched);
  const now = context.now();
  context.onFolded(messages.map(({ receivedAt }) => now - receivedAt));
}

async function feedAll(
  context: FoldContext,
  slot: PumpSlot,
  events: readonly PumpEvent[],
  sequence: number,
): Promise<boolean> {
  try {
    for (const event of events) feedSlot(slot, event, sequence);
    return true;
  } catch (error) {
    await quarantine(context, slot, error);
    return false;
  }
}
