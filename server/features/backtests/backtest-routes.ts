import type { Mount } from '#server/http/mount.ts';
import { backtestEndpoints } from '#shared/contract/http/backtests.ts';
import { askBacktest } from './ask-backtest.ts';
import { cancelBacktest } from './cancel-backtest.ts';
import { listBacktests, readBacktest } from './read-backtest.ts';

/** Backtests over HTTP; the worker folds them. */
export function mountBacktestRoutes(mount: Mount): void {
  mount.person(backtestEndpoints.ask, (context, { body }) => askBacktest(context, body));
  mount.person(backtestEndpoints.list, (context) => listBacktests(context));
  mount.person(backtestEndpoints.read, (context, { params }) => readBacktest(context, params.backtestId));
  mount.person(backtestEndpoints.cancel, (context, { params }) => cancelBacktest(context, params.backtestId));
}
