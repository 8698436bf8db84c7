import type { RuleScope } from '#shared/contract/http/rules.ts';
import type { RuleSettings } from '#shared/domain/detectors/rule-settings.ts';

/** What was asked of a backtest, as its row keeps it. */
export type BacktestRequest = {
  readonly scope: RuleScope;
  readonly scopeName: string;
  readonly rules: RuleSettings;
  readonly from: number;
  readonly to: number;
  readonly pumpIds: readonly string[];
};

/** The row is written by the verb that asks, from what the contract let through. */
export const parseRequest = (value: unknown): BacktestRequest => value as BacktestRequest;
