import { dropOldReadingPartitions, makeReadingPartitions } from '#server/db/reading-partitions.ts';
import type { Job } from './job.ts';

const HOUR_MS = 3_600_000;

/** Makes the partitions of the days to come and drops those that are over. */
export const keepPartitions: Job = {
  name: 'keep partitions',
  everyMs: HOUR_MS,
  run: async ({ pool, log }) => {
    const made = await makeReadingPartitions(pool);
    const dropped = await dropOldReadingPartitions(pool);
    if (made + dropped > 0) log.info({ made, dropped }, 'partitions of readings kept');
  },
};
