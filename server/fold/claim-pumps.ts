import { asMachine } from '#server/db/transaction.ts';
import { claimFreePumps, claimPumps } from './claim-repository.ts';
import type { ClaimedState } from './claimed-state.ts';
import { fallBehind } from './fall-behind.ts';
import type { FoldContext } from './fold-context.ts';
import { createPumpSlot } from './pump-slot.ts';

/**
 * What another living process was storing of a pump when its device moved here has been stored or given up after this
 * long: longer than any statement may take. Until then nothing of the pump is read, so that nothing is passed over.
 */
const TAKE_OVER_PATIENCE_MS = 12_000;

const SLOTS_A_TURN = 20;

/** Takes every monitored pump that no living process folds; answers how many. */
export async function takeFreePumps(context: FoldContext): Promise<number> {
  const states = await asMachine(context.pool, (_db, client) => claimFreePumps(client, context.epoch));
  return addSlots(context, states);
}

/** Takes these pumps, whoever folds them now. */
export async function takePumps(context: FoldContext, pumpIds: readonly string[]): Promise<number> {
  const states = await asMachine(context.pool, (_db, client) => claimPumps(client, context.epoch, pumpIds));
  return addSlots(context, states);
}

async function addSlots(context: FoldContext, states: readonly ClaimedState[]): Promise<number> {
  if (states.length === 0) return 0;
  const pumps = await context.listPumps(states.map(({ pumpId }) => pumpId));
  const byId = new Map(pumps.map((pump) => [pump.pumpId, pump]));
  for (const [index, state] of states.entries()) {
    // Building a fold takes a moment: ten thousand of them must not stop everything else.
    if (index % SLOTS_A_TURN === SLOTS_A_TURN - 1) await new Promise((resolve) => setImmediate(resolve));
    const pump = byId.get(state.pumpId);
    if (pump === undefined) continue;
    const notBefore = context.now() + (state.takenOver ? TAKE_OVER_PATIENCE_MS : 0);
    const slot = createPumpSlot(pump, state, notBefore);
    slot.fold.push({ kind: 'listening', receivedAt: context.listeningSince });
    context.slots.set(slot);
    fallBehind(context, slot, 'behind', notBefore);
  }
  return states.length;
}
