/**
 * Stands between a test run and its PostgreSQL: when the run is over, or dies by any hand, this standard input closes,
 * the server is stopped and its folder removed. Started with the run folder as its argument, in a group of its own.
 */
import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { stopCluster } from '#server/bootstrap/cluster.mjs';

const runFolder = process.argv[2] ?? '';
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(signal, () => undefined);
process.stdin.resume().on('end', async () => {
  // Nothing in it is worth a checkpoint: it is deleted next.
  await stopCluster(join(runFolder, 'data'), { graceMs: 2_000 });
  rmSync(runFolder, { recursive: true, force: true });
  process.exit(0);
});
