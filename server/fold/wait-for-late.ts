import type { PumpSlot } from './pump-slot.ts';

/** A backlog brings many late readings in a row: they are corrected together, a little later. */
export const LATE_PATIENCE_MS = 10_000;
/** Where nothing has changed since the last look, the next one comes after this. */
const LOOK_AGAIN_MS = 5 * 60_000;

type Late = Pick<PumpSlot, 'lateAt' | 'lateDueAt' | 'lateLook' | 'writtenRunMark'>;

/** What decides whether another look can do more: how many came, and which run is open, since that is folded on. */
const sightOf = ({ lateAt, writtenRunMark }: Late): string => `${lateAt.length} ${writtenRunMark ?? ''}`;

/** Whether a pump's late readings are to be looked at now (ms): some are there, and something can come of it. */
export function isLateDue(slot: Late, now: number): boolean {
  const { lateAt, lateDueAt, lateLook } = slot;
  if (lateAt.length === 0 || lateDueAt > now) return false;
  return lateLook === undefined || lateLook.sight !== sightOf(slot) || now - lateLook.at >= LOOK_AGAIN_MS;
}

/** Notes a look, before it is taken. */
export function waitForMoreLate(slot: Late, now: number): void {
  slot.lateDueAt = now + LATE_PATIENCE_MS;
  slot.lateLook = { at: now, sight: sightOf(slot) };
}
