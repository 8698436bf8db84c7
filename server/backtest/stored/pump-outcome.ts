import {
  type ComparedAlarm,
  compareAlarms,
  countNeedless,
  type RaisedAlarm,
} from '#shared/domain/backtest/compare-alarms.ts';

/** What a backtest found on one pump. */
export type PumpOutcome =
  | {
      readonly kind: 'folded';
      readonly readings: number;
      readonly alarms: readonly ComparedAlarm[];
      readonly needless: { readonly answered: number; readonly before: number; readonly after: number };
    }
  | { readonly kind: 'failed'; readonly reason: string };

/** The row is written by the worker alone. */
export const parseOutcome = (value: unknown): PumpOutcome => value as PumpOutcome;

type Raised = {
  readonly before: readonly RaisedAlarm[];
  readonly after: readonly RaisedAlarm[];
  readonly answered: readonly RaisedAlarm[];
  readonly readings: number;
};

/** Sets what the two versions raised side by side, beside what people answered. */
export const makeOutcome = ({ before, after, answered, readings }: Raised): PumpOutcome => ({
  kind: 'folded',
  readings,
  alarms: compareAlarms(before, after),
  needless: {
    answered: answered.length,
    before: countNeedless(answered, before),
    after: countNeedless(answered, after),
  },
});
