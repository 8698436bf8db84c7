import type { StoredMessage } from '#server/ingest/stored-message.ts';
import { eventsOfMessage } from './events-of-message.ts';
import type { FoldContext } from './fold-context.ts';
import { feedSlot, type PumpSlot } from './pump-slot.ts';
import { quarantine, saveTouched } from './save-touched.ts';

/** Readings that are folded before the event loop gets its turn. */
const EVENTS_A_TURN = 400;

/**
 * Folds messages that were stored a moment ago, and commits what came of them in one transaction. Pump by pump: the
 * state of one is a few kilobytes, which are fetched once and not once a message.
 */
export async function foldMessages(context: FoldContext, messages: readonly StoredMessage[]): Promise<void> {
  const touched = new Set<PumpSlot>();
  let fed = 0;
  for (const [slot, ofPump] of groupBySlot(context, messages)) {
    // Folding must not keep what arrives meanwhile from being acknowledged.
    if (fed >= EVENTS_A_TURN) await new Promise((resolve) => setImmediate(resolve));
    fed = fed >= EVENTS_A_TURN ? 0 : fed + countEvents(ofPump);
    if (await feedAll(context, slot, ofPump)) touched.add(slot);
  }
  await saveTouched(context, touched);
  const now = context.now();
  context.onFolded(messages.map(({ receivedAt }) => now - receivedAt));
}

function groupBySlot(context: FoldContext, messages: readonly StoredMessage[]): Map<PumpSlot, StoredMessage[]> {
  const groups = new Map<PumpSlot, StoredMessage[]>();
  for (const message of messages) {
    const slot = context.slots.find(message.pumpId);
    // What is behind reads this message from the database, in its turn.
    if (slot === undefined || slot.mode !== 'live' || message.sequence <= slot.cursor) continue;
    const group = groups.get(slot);
    if (group === undefined) groups.set(slot, [message]);
    else group.push(message);
  }
  return groups;
}

const countEvents = (messages: readonly StoredMessage[]) =>
  messages.reduce((sum, { readings }) => sum + Math.max(1, readings.length), 0);

async function feedAll(context: FoldContext, slot: PumpSlot, messages: readonly StoredMessage[]): Promise<boolean> {
  try {
    for (const message of messages) {
      for (const event of eventsOfMessage(message)) feedSlot(slot, event, message.sequence);
    }
    return true;
  } catch (error) {
    await quarantine(context, slot, error);
    return false;
  }
}
