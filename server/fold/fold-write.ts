import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import type { FoldOutput, PumpNow } from '#shared/domain/fold/fold-output.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import type { PumpSlot } from './pump-slot.ts';
import { encodeHot } from './saved-hot.ts';

/** The state a fold goes on from, with the place in the order of arrival that it stands for: written together, always. */
export type SavedState = {
  readonly cursor: number;
  readonly hot: string;
  /** Only when it changed since it was last written. */
  readonly learnt: { readonly version: number; readonly json: string } | undefined;
};

/** Everything one commit says of one pump. */
export type FoldWrite = {
  readonly slot: PumpSlot;
  /** Undefined = as it was written before: after a crash the events since then are folded again. */
  readonly state: SavedState | undefined;
  readonly now: PumpNow | undefined;
  readonly highWater: number | undefined;
  readonly heardAt: number | undefined;
  readonly silentSince: number | undefined;
  readonly lostAt: number | undefined;
  /** The device has been gone long enough for its drop to be weighed with its neighbours'. */
  readonly stayedAway: boolean;
  readonly runs: readonly Run[];
  readonly signals: readonly AlarmSignal[];
  readonly unfolded: FoldOutput['unfolded'];
};

/**
 * Folding again is harmless as long as it says nothing twice: runs are named by their beginning. What it would cost is
 * time after a crash, what it saves is most of the writing.
 */
const STATE_EVERY_MS = 30_000;

type TakeOptions = { readonly output?: FoldOutput; readonly whole?: boolean; readonly stayedAway?: boolean };

/**
 * Takes what a pump's fold put out. The state goes with it when there are signals, which must never be said twice, and
 * otherwise every half minute; `whole` = in any case.
 */
export function takeFoldWrite(
  slot: PumpSlot,
  at: number,
  { output = slot.fold.take(), whole = false, stayedAway = false }: TakeOptions = {},
): FoldWrite {
  const { signals } = output;
  const isDue = whole || signals.length > 0 || at - slot.stateSavedAt >= STATE_EVERY_MS;
  return {
    slot,
    state: isDue ? takeState(slot, at) : undefined,
    now: slot.fold.now(),
    highWater: slot.fold.highWater(),
    heardAt: slot.heardAt,
    silentSince: slot.silentSince,
    lostAt: slot.fold.lostAt(),
    stayedAway,
    runs: chooseRuns(slot, output.runs, isDue),
    signals,
    unfolded: output.unfolded,
  };
}

/**
 * Every reading changes the means of the open run a little. It is written when it opens, closes or is marked, and else
 * with the state: twice a minute.
 */
function chooseRuns(slot: PumpSlot, runs: readonly Run[], isStateDue: boolean): Run[] {
  const byStart = new Map(
    [...(slot.heldRun === undefined ? [] : [slot.heldRun]), ...runs].map((run) => [run.from, run]),
  );
  const chosen = [...byStart.values()];
  const last = chosen.at(-1);
  const mark = last?.to === undefined && last !== undefined ? `${last.from} ${last.flags.join(' ')}` : undefined;
  const isHeld = !isStateDue && chosen.length === 1 && mark !== undefined && mark === slot.writtenRunMark;
  slot.heldRun = isHeld ? last : undefined;
  if (isHeld) return [];
  if (chosen.length > 0) slot.writtenRunMark = mark;
  return chosen;
}

function takeState(slot: PumpSlot, at: number): SavedState {
  const { hot, learnt, learntVersion } = slot.fold.save();
  slot.stateSavedAt = at;
  const isLearnt = learntVersion !== slot.learntVersion;
  return {
    cursor: slot.cursor,
    hot: encodeHot(hot, slot),
    learnt: isLearnt ? { version: learntVersion, json: JSON.stringify(learnt) } : undefined,
  };
}
