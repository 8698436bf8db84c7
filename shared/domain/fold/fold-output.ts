import type { Because, RunSource } from '../control/decision.ts';
import type { AlarmSignal } from '../detectors/detector.ts';
import type { ReadingFault } from '../readings/check-reading.ts';
import type { Refusal } from '../refusal/refusal.ts';
import type { Run } from '../runs/run.ts';

/**
 * What one call of the fold produced. `runs` holds every run that opened, changed or closed, each in its last state
 * and once per `from`; `signals` every alarm signal in order; `unfolded` the readings that the pump's model cannot say.
 */
export type FoldOutput = {
  readonly runs: Run[];
  readonly signals: AlarmSignal[];
  readonly unfolded: readonly UnfoldedReading[];
};

/** A reading that was not folded, by its device time, ms, and everything that is wrong with it. */
export type UnfoldedReading = { readonly at: number; readonly faults: readonly Refusal<ReadingFault>[] };

/** The pump this instant, derived from its state: what a screen's row shows. */
export type PumpNow = {
  /** Device time of the last reading folded, ms. */
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
  readonly closedInputs: number;
  readonly activeInput: number;
  readonly source: RunSource;
  readonly expectedSource: RunSource;
  readonly expectedRpm: number;
  readonly because: Because;
  readonly until: number | undefined;
  readonly lockedBy: number | undefined;
  /** undefined = not judged (off, or still learning). */
  readonly primed: boolean | undefined;
  /** Flow now with one standard deviation, US gpm; undefined where the readings cannot tell. */
  readonly flow: { readonly gpm: number; readonly sigmaGpm: number } | undefined;
};

/*
 * The fold's own interface, in fold-pump.ts:
 *   createPumpFold(context, saved?: { hot: unknown; learnt: unknown }): PumpFold
 *   PumpFold = {
 *     push(event: PumpEvent): void          // mutates; outputs gather until taken
 *     take(): FoldOutput                    // and empties
 *     now(): PumpNow | undefined
 *     highWater(): number | undefined       // device time of the last reading folded
 *     save(): { hot: JSON; learnt: JSON; learntVersion: number }  // learntVersion grows only when learnt state changed
 *     withContext(context): PumpFold        // the same state under new commissioned data
 *   }
 * A reading at or below highWater() is refused by push (the caller corrects runs of the day through refoldRuns).
 */
