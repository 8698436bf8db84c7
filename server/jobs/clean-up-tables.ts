import { cleanUp } from './clean-up-repository.ts';
import type { Job } from './job.ts';

/** Deletes what no longer serves anybody. */
export const cleanUpTables: Job = {
  name: 'clean up',
  everyMs: 5 * 60_000,
  run: async ({ pool, log }) => {
    const deleted = await cleanUp(pool);
    if (Object.keys(deleted).length > 0) log.info({ deleted }, 'cleaned up');
  },
};
