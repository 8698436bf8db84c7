import type { Bench } from './bench.ts';
import { startLoad } from './load.ts';
import { fillDatabase, startWatch } from './watch.ts';

const DEVICES = 5000;
const SECONDS = 10;

/** What a connected device costs in memory, and that as many at once are served. */
export const connectedDevices: Bench = {
  name: 'connected-devices',
  about: `${DEVICES} devices connected at once`,
  run: async ({ postgres }) => {
    const database = await (await postgres()).createDatabase('connected');
    const devices = await fillDatabase(database, DEVICES);
    const watch = await startWatch(database);
    await watch.understood();
    const before = await watch.counts();
    const load = await startLoad({ port: watch.port, devices, readingsPerMessage: 1, window: 1 });
    try {
      const report = await load.run({ seconds: SECONDS, messagesPerSecond: DEVICES / 10 });
      await watch.understood();
      const after = await watch.counts();
      const kilobytes = (after.rss - before.rss) / 1024 / DEVICES;
      return [
        { name: 'devices connected', value: after.connected, unit: '', atLeast: DEVICES },
        { name: 'memory a connected device', value: kilobytes, unit: 'KiB', atMost: 64 },
        { name: 'acknowledged p95, each once in ten seconds', value: report.p95, unit: 'ms' },
      ];
    } finally {
      await Promise.all([load.stop(), watch.stop()]);
      await database.drop();
    }
  },
};
