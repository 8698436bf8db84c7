import { classifyDatabaseFault } from '#server/ingest/database-fault.ts';
import { commitFold } from './commit-fold.ts';
import { fallBehind } from './fall-behind.ts';
import type { FoldContext } from './fold-context.ts';
import { setAside } from './fold-repository.ts';
import { type FoldWrite, takeFoldWrite } from './fold-write.ts';
import type { PumpSlot } from './pump-slot.ts';

/** A write that failed is read anew after this, ms. */
const RELOAD_AFTER_MS = 500;
const MOST_RACES = 5;
const STATES_A_COMMIT = 500;

/**
 * Commits what the fold of some pumps put out, together. A pump that another process owns by now is let go. Where the
 * database cannot be reached the pumps go back to what is stored and are folded again from there.
 */
export async function saveTouched(context: FoldContext, touched: Iterable<PumpSlot>): Promise<void> {
  const now = context.now();
  const slots = [...touched].filter(({ mode }) => mode !== 'set-aside');
  const writes = slots.map((slot) => takeFoldWrite(slot, now));
  await saveWrites(context, writes);
}

/** Writes the states of all pumps of which something was folded since: the next start has nothing to fold again. */
export async function saveStates(context: FoldContext): Promise<void> {
  const now = context.now();
  const old = context.slots.list().filter(({ mode, isStateOld }) => mode === 'live' && isStateOld);
  for (let from = 0; from < old.length; from += STATES_A_COMMIT) {
    const writes = old.slice(from, from + STATES_A_COMMIT).map((slot) => takeFoldWrite(slot, now, { whole: true }));
    await saveWrites(context, writes);
  }
}

/** The same for output that was taken already. */
export async function saveWrites(context: FoldContext, writes: readonly FoldWrite[], races = 0): Promise<void> {
  if (writes.length === 0) return;
  if (races === 0) sayUnfolded(context, writes);
  try {
    const { written, alarms, mails } = await commitFold(context, writes);
    for (const write of writes) afterWrite(context, write, written.has(write.slot.pump.pumpId));
    const changed = writes.filter(({ slot }) => written.has(slot.pump.pumpId));
    const alarmed = alarms.flatMap(({ pumpId }) => pumpId ?? []);
    context.onNews({ pumpIds: [...new Set([...changed.map(({ slot }) => slot.pump.pumpId), ...alarmed])], mails });
  } catch (error) {
    const fault = classifyDatabaseFault(error);
    if (fault === 'again' && races < MOST_RACES) await saveWrites(context, writes, races + 1);
    else if (fault === 'data') await saveOneByOne(context, writes, error);
    else reload(context, writes, error);
  }
}

/** Stored before the pump's model was known, or fitted: kept, and told of by name. */
function sayUnfolded({ log }: FoldContext, writes: readonly FoldWrite[]): void {
  for (const { slot, unfolded } of writes) {
    const [first] = unfolded;
    if (first === undefined) continue;
    log.warn({ pump: slot.pump.pumpId, readings: unfolded.length, ...first }, 'readings are not folded');
  }
}

function afterWrite(context: FoldContext, write: FoldWrite, isWritten: boolean): void {
  const { slot, state, silentSince, lostAt } = write;
  if (isWritten) Object.assign(slot, { storedSilentSince: silentSince, storedLostAt: lostAt });
  if (isWritten && write.stayedAway) slot.weighedLostAt = lostAt;
  if (state !== undefined && isWritten) slot.isStateOld = false;
  if (state?.learnt !== undefined && isWritten) slot.learntVersion = state.learnt.version;
  if (!isWritten) {
    context.slots.delete(slot.pump.pumpId);
    context.log.info({ pump: slot.pump.pumpId }, 'pump is folded by another process now');
  }
}

/** One pump's output that the database cannot take must not hold back the others. */
async function saveOneByOne(context: FoldContext, writes: readonly FoldWrite[], error: unknown): Promise<void> {
  const [only] = writes;
  if (writes.length === 1 && only !== undefined) return quarantine(context, only.slot, error);
  for (const write of writes) await saveWrites(context, [write], 0);
}

/** The rows may or may not have been written: what is stored decides, and the events since then are folded again. */
function reload(context: FoldContext, writes: readonly FoldWrite[], error: unknown): void {
  context.log.warn({ err: error, pumps: writes.length }, 'folding could not be stored, trying again');
  for (const { slot } of writes) fallBehind(context, slot, 'reload', context.now() + RELOAD_AFTER_MS);
}

/** Sets one pump aside and says which detector is to blame; its readings go on being stored and acknowledged. */
export async function quarantine(context: FoldContext, slot: PumpSlot, error: unknown): Promise<void> {
  slot.mode = 'set-aside';
  const reason = error instanceof Error ? error.message : String(error);
  context.log.error({ err: error, pump: slot.pump.pumpId }, 'pump set aside: its readings cannot be folded');
  try {
    await setAside(context.pool, context.epoch, slot.pump.pumpId, reason);
    context.onNews({ pumpIds: [slot.pump.pumpId], mails: 0 });
  } catch (failure) {
    context.log.warn({ err: failure }, 'could not note that a pump was set aside');
  }
}
