import { type Bench, quantile } from './bench.ts';
import { startLoad } from './load.ts';
import { fillDatabase, startWatch } from './watch.ts';

const READINGS_PER_SECOND = 1000;
const WARM_UP_SECONDS = 5;
const SECONDS = 20;

/** How long after its arrival a reading is understood: runs, state and alarms committed. */
export const foldLag: Bench = {
  name: 'fold-lag',
  about: `how long a reading waits to be understood at ${READINGS_PER_SECOND} readings a second`,
  run: async ({ postgres }) => {
    const database = await (await postgres()).createDatabase('fold_lag');
    const devices = await fillDatabase(database, READINGS_PER_SECOND);
    const watch = await startWatch(database);
    const load = await startLoad({ port: watch.port, devices, readingsPerMessage: 1, window: 1 });
    try {
      await load.run({ seconds: WARM_UP_SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      await watch.takeLags();
      const report = await load.run({ seconds: SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      await watch.understood();
      const lags = await watch.takeLags();
      return [
        { name: 'fold lag p95 at 1,000 readings/s', value: quantile(lags, 0.95), unit: 'ms', atMost: 1000 },
        { name: 'fold lag p50', value: quantile(lags, 0.5), unit: 'ms' },
        { name: 'acknowledged p95 at 1,000 readings/s', value: report.p95, unit: 'ms' },
      ];
    } finally {
      await Promise.all([load.stop(), watch.stop()]);
      await database.drop();
    }
  },
};
