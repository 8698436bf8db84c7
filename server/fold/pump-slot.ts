import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import { silenceLimitMs } from '#shared/domain/detectors/link/link-tracker.ts';
import { createPumpFold, type PumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import type { ClaimedState } from './claimed-state.ts';
import { readHot } from './saved-hot.ts';
import { LATE_PATIENCE_MS } from './wait-for-late.ts';

/**
 * A pump as this process folds it. `live` = the next event comes from memory; `behind` = its events are read from the
 * database first; `reload` = so is its state, since a write failed; `set-aside` = a detector threw.
 */
export type PumpSlot = {
  pump: CommissionedPump;
  fold: PumpFold;
  mode: 'live' | 'behind' | 'reload' | 'set-aside';
  /** Arrival sequence of the last event folded, and of the last that is known to be stored. */
  cursor: number;
  lastStored: number;
  /** Not to be read from the database before this, ms. */
  notBefore: number;
  learntVersion: number;
  /** When the state was last written, ms; whether anything was folded since. */
  stateSavedAt: number;
  isStateOld: boolean;
  /** The open run as it is, where that is not written yet, and what of an open run was written last. */
  heldRun: Run | undefined;
  writtenRunMark: string | undefined;
  heardAt: number | undefined;
  silentSince: number | undefined;
  /** The same as it is stored: what the fold over the company's pumps has been told. */
  storedSilentSince: number | undefined;
  storedLostAt: number | undefined;
  /** The drop that was weighed with its neighbours' once it had lasted, ms. */
  weighedLostAt: number | undefined;
  connection: string | undefined;
  lateAt: number[];
  /** Late readings are looked at then, ms, at the earliest; and how things stood when they last were. */
  lateDueAt: number;
  lateLook: { readonly at: number; readonly sight: string } | undefined;
};

/** Late readings of one pump that are remembered one by one; beyond it the span between them is. */
const MAX_LATE = 1000;

/** A slot that goes on from a claimed state. Its events since then have still to be read. */
export function createPumpSlot(pump: CommissionedPump, state: ClaimedState, notBefore: number): PumpSlot {
  const hot = readHot(state.hot);
  return {
    pump,
    fold: createPumpFold(pump.context, { hot: hot.fold, learnt: state.learnt }, pump.rules),
    mode: 'behind',
    cursor: state.cursor,
    lastStored: state.cursor,
    notBefore,
    learntVersion: state.learntVersion,
    // Not all pumps in the same half minute.
    stateSavedAt: notBefore - ((pump.pumpNumber * 7919) % 30_000),
    isStateOld: false,
    heldRun: undefined,
    writtenRunMark: undefined,
    heardAt: state.heardAt,
    silentSince: state.silentSince,
    storedSilentSince: state.silentSince,
    storedLostAt: state.lostAt,
    weighedLostAt: undefined,
    connection: hot.connection,
    lateAt: [...hot.lateAt],
    lateDueAt: 0,
    lateLook: undefined,
  };
}

/** Folds one stored event. Throws what a detector throws. */
export function feedSlot(slot: PumpSlot, event: PumpEvent, sequence: number): void {
  noteWord(slot, event);
  if (event.kind === 'reading' && event.reading.at <= (slot.fold.highWater() ?? Number.NEGATIVE_INFINITY)) {
    noteLate(slot, event.reading.at, event.receivedAt);
  }
  slot.fold.push(event);
  slot.cursor = sequence;
  slot.isStateOld = true;
}

/** Advances a pump's time where nothing was heard; says whether its silence began now. */
export function tickSlot(slot: PumpSlot, now: number, listeningSince: number): boolean {
  slot.fold.push({ kind: 'time', receivedAt: now });
  if (slot.heardAt === undefined || slot.silentSince !== undefined) return false;
  if (now - Math.max(slot.heardAt, listeningSince) <= silenceLimitMs(slot.pump.context)) return false;
  slot.silentSince = slot.heardAt;
  return true;
}

function noteWord(slot: PumpSlot, event: PumpEvent): void {
  const isLost = event.kind === 'status' && event.status.state === 'lost';
  if (event.kind === 'status' && event.status.state === 'online') slot.connection = event.status.connection;
  if (!isLost) {
    slot.heardAt = event.receivedAt;
    slot.silentSince = undefined;
    return;
  }
  // A take-over publishes the will of the old connection late.
  if (slot.connection !== undefined && slot.connection !== event.status.connection) return;
  slot.silentSince ??= event.receivedAt;
}

function noteLate(slot: PumpSlot, at: number, now: number): void {
  if (slot.lateAt.length === 0) slot.lateDueAt = now + LATE_PATIENCE_MS;
  if (slot.lateAt.length < MAX_LATE) {
    slot.lateAt.push(at);
    return;
  }
  slot.lateAt = [Math.min(at, ...slot.lateAt), Math.max(at, ...slot.lateAt)];
}
