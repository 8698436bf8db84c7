import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import type { FoldOutput, PumpNow } from '#shared/domain/fold/fold-output.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import type { PumpSlot } from './pump-slot.ts';
import { encodeHot } from './saved-hot.ts';

/** Everything one commit says of one pump. */
export type FoldWrite = {
  readonly slot: PumpSlot;
  readonly cursor: number;
  readonly hot: string;
  readonly now: PumpNow | undefined;
  readonly highWater: number | undefined;
  readonly heardAt: number | undefined;
  readonly silentSince: number | undefined;
  /** Only when it changed since it was last written. */
  readonly learnt: { readonly version: number; readonly json: string } | undefined;
  readonly runs: readonly Run[];
  readonly signals: readonly AlarmSignal[];
};

/** Takes what a pump's fold put out, with its state as it is after that. */
export function takeFoldWrite(slot: PumpSlot, output: FoldOutput = slot.fold.take()): FoldWrite {
  const { fold } = slot;
  const { runs, signals } = output;
  const saved = fold.save();
  const isLearnt = saved.learntVersion !== slot.learntVersion;
  return {
    slot,
    cursor: slot.cursor,
    hot: encodeHot(saved.hot, slot),
    now: fold.now(),
    highWater: fold.highWater(),
    heardAt: slot.heardAt,
    silentSince: slot.silentSince,
    learnt: isLearnt ? { version: saved.learntVersion, json: JSON.stringify(saved.learnt) } : undefined,
    runs,
    signals,
  };
}
