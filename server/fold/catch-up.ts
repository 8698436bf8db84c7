import { asMachine } from '#server/db/transaction.ts';
import { loadOwnStates } from './claim-repository.ts';
import type { FoldContext } from './fold-context.ts';
import { listPumpsWithEvents } from './fold-repository.ts';
import { createPumpSlot, feedSlot, type PumpSlot } from './pump-slot.ts';
import { quarantine, saveTouched } from './save-touched.ts';
import { readStoredEvents, type StoredEvent } from './stored-events-repository.ts';

/**
 * Folds what is stored of the pumps that are behind, up to the present. A pump whose stored events have all been
 * folded goes on from memory; one of which more was stored meanwhile stays behind for the next round. `between` is
 * called between two portions.
 */
export async function catchUp(context: FoldContext, between: () => Promise<void>): Promise<void> {
  try {
    await reloadSlots(context);
    const slots = await listReady(context);
    if (slots.length > 0) await readAndFold(context, slots, between);
  } finally {
    scheduleNext(context);
  }
}

async function readAndFold(
  context: FoldContext,
  slots: readonly PumpSlot[],
  between: () => Promise<void>,
): Promise<void> {
  const from = slots.reduce((least, { cursor }) => Math.min(least, cursor), Number.MAX_SAFE_INTEGER);
  const numbers = slots.map(({ pump }) => pump.pumpNumber);
  await asMachine(context.pool, async (_db, client) => {
    await client.query('set local statement_timeout = 0');
    for await (const events of readStoredEvents(client, from, numbers)) {
      await foldStored(context, events);
      await between();
    }
  });
  for (const slot of slots) if (slot.mode === 'behind' && slot.cursor >= slot.lastStored) slot.mode = 'live';
}

function scheduleNext(context: FoldContext): void {
  context.catchUpAt = Number.POSITIVE_INFINITY;
  for (const { mode, notBefore } of context.slots.list()) {
    if (mode === 'behind' || mode === 'reload') context.catchUpAt = Math.min(context.catchUpAt, notBefore);
  }
}

async function listReady(context: FoldContext): Promise<PumpSlot[]> {
  const now = context.now();
  const behind = context.slots.list().filter(({ mode, notBefore }) => mode === 'behind' && notBefore <= now);
  const fresh = behind.filter(({ cursor }) => cursor === 0);
  if (fresh.length === 0) return behind;
  // A pump that never said anything would send the search back to the first reading of all.
  const spoken = await listPumpsWithEvents(
    context.pool,
    fresh.map(({ pump }) => pump.pumpId),
  );
  for (const slot of fresh) if (!spoken.has(slot.pump.pumpId) && slot.lastStored === 0) slot.mode = 'live';
  return behind.filter(({ mode }) => mode === 'behind');
}

async function foldStored(context: FoldContext, events: readonly StoredEvent[]): Promise<void> {
  const touched = new Set<PumpSlot>();
  for (const { pumpNumber, sequence, event } of events) {
    const slot = context.slots.findByNumber(pumpNumber);
    if (slot === undefined || slot.mode !== 'behind' || sequence <= slot.cursor) continue;
    try {
      feedSlot(slot, event, sequence);
      touched.add(slot);
    } catch (error) {
      await quarantine(context, slot, error);
    }
  }
  await saveTouched(context, touched);
}

/** Brings pumps whose write failed back to what is stored; those that are not ours any more are let go. */
async function reloadSlots(context: FoldContext): Promise<void> {
  const now = context.now();
  const broken = context.slots.list().filter(({ mode, notBefore }) => mode === 'reload' && notBefore <= now);
  if (broken.length === 0) return;
  const states = await loadOwnStates(
    context.pool,
    context.epoch,
    broken.map(({ pump }) => pump.pumpId),
  );
  const byPump = new Map(states.map((state) => [state.pumpId, state]));
  for (const slot of broken) {
    const state = byPump.get(slot.pump.pumpId);
    if (state === undefined) context.slots.delete(slot.pump.pumpId);
    else context.slots.set({ ...createPumpSlot(slot.pump, state, now), lastStored: slot.lastStored });
  }
}
