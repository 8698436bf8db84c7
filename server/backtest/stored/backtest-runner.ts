import { type BacktestWork, runBacktest } from './run-backtest.ts';
import { claimBacktest, endBacktest } from './stored-backtest-repository.ts';

/** Works off backtests, one after another. */
export type BacktestRunner = {
  readonly start: () => void;
  /** Something may wait. */
  readonly wake: () => void;
  /** Leaves what is underway to the next worker. */
  readonly stop: () => Promise<void>;
};

const LOOK_EVERY_MS = 5000;

/** Nothing runs before `start`. Any number of workers may run one: each backtest is claimed by one of them. */
export function createBacktestRunner(options: Omit<BacktestWork, 'isStopping'>): BacktestRunner {
  let isStopping = false;
  let working: Promise<void> | undefined;
  let isRung = false;
  let timer: NodeJS.Timeout | undefined;
  const work: BacktestWork = { ...options, isStopping: () => isStopping };

  const workOff = async (): Promise<void> => {
    do {
      isRung = false;
      for (let claimed = await claimNext(work); claimed; claimed = await claimNext(work)) {
        const { id } = claimed;
        await runBacktest(work, claimed).catch((error: unknown) => giveUp(work, id, error));
      }
    } while (isRung && !isStopping);
  };
  const wake = (): void => {
    isRung = true;
    if (isStopping || working !== undefined) return;
    working = workOff()
      .catch((err: unknown) => options.log.warn({ err }, 'backtests cannot run now'))
      .finally(() => (working = undefined));
  };
  return {
    start: () => {
      timer = setInterval(wake, LOOK_EVERY_MS);
      wake();
    },
    wake,
    stop: async () => {
      isStopping = true;
      clearInterval(timer);
      await working;
    },
  };
}

const claimNext = async ({ pool, now, isStopping }: BacktestWork) =>
  isStopping() ? undefined : claimBacktest(pool, now());

/** A fault of ours, or of the database. Where it cannot even be noted, another attempt follows when nobody works on it. */
async function giveUp({ pool, now, log }: BacktestWork, backtestId: string, error: unknown): Promise<void> {
  log.error({ err: error, backtest: backtestId }, 'a backtest failed');
  const failure = 'It could not be folded: a fault of ours, which the server’s log tells of.';
  await endBacktest(pool, backtestId, { state: 'failed', failure, now: now() });
}
