import type { Job } from './job.ts';

const EVERY_MS = 6 * 3_600_000;

/**
 * Steps of five minutes are kept 60 days, hours two years and the month begun then, days and months for ever: a month is priced
 * from its hours, so they go together. Pump by pump, by the tables' own keys.
 */
const STATEMENTS = {
  'steps of five minutes': `delete from pump_day_fives where day < (now() at time zone 'UTC')::date - 61`,
  hours: `delete from pump_day_hours h using pumps p
    where h.pump_id = p.id and h.day < date_trunc('month', (now() at time zone 'UTC')::date - interval '2 years' - interval '1 day')::date`,
} as const;

/** Takes away what the rollups no longer keep. */
export const pruneRollups: Job = {
  name: 'prune rollups',
  everyMs: EVERY_MS,
  run: async ({ pool, log }) => {
    for (const [what, statement] of Object.entries(STATEMENTS)) {
      const { rowCount } = await pool.query(statement);
      if (rowCount !== null && rowCount > 0) log.info({ what, days: rowCount }, 'rollups pruned');
    }
  },
};
